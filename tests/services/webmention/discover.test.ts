import { describe, expect, it } from "vitest";
import { endpointOf } from "~/services/webmention/discover";
import { outwardLinks } from "~/services/webmention/outward-links";

/**
 * W3C Webmention, recommendation of 12 January 2017, 3.1.2 "Sender discovers receiver Webmention endpoint", case by case.
 */
const URL_OF_PAGE = "https://notes.example/posts/one?draft=0";
const page = (text: string, links: string[] = [], mediaType = "text/html") =>
  endpointOf({ url: URL_OF_PAGE, mediaType, text, links });
const END = "https://notes.example/end";

describe("endpointOf", () => {
  it.each([
    ["relative", "</end>; rel=webmention"],
    ["whole", `<${END}>; rel=webmention`],
    ["quoted rel", '</end>; rel="webmention"'],
    ["several rels", '</end>; rel="somethingelse webmention"'],
    ["other letters", "</end>; REL=WebMention"],
    ["no blanks", "</end>;rel=webmention"],
    ["the second of one header", '</other>; rel="other", </end>; rel="webmention"'],
    ["a comma in an address", "<https://notes.example/a,b>; rel=x, </end>; rel=webmention"],
    ["a comma and a sign in quotes", '</a>; title="a, <b>; rel=webmention"; rel=x, </end>; rel=webmention'],
    ["anchored at this page", '</end>; anchor="/posts/one?draft=0"; rel=webmention'],
  ])("reads the Link header: %s", (_, header) => expect(page("", [header])).toBe(END));

  it("takes the first of several headers, and the header before the page", () => {
    expect(page("", ["</x>; rel=x", "</end>; rel=webmention", "</late>; rel=webmention"])).toBe(END);
    expect(
      page('<link rel="webmention" href="/no"><a rel="webmention" href="/no">', ["</end>; rel=webmention"]),
    ).toBe(END);
    expect(page("", ["</end>; rel=webmention"], "image/png")).toBe(END);
  });

  it.each([
    ["link", '<link rel="webmention" href="/end">'],
    ["a", '<a href="/end" rel="webmention">tell</a>'],
    ["several rels", '<link rel="other  WebMention" href="/end">'],
    ["a before link", '<body><a rel="webmention" href="/end"><link rel="webmention" href="/no">'],
    ["link before a", '<link rel="webmention" href="/end"><a rel="webmention" href="/no">'],
    ["one without an address first", '<link rel="webmention"><a rel="webmention" href="/end">'],
    ["one in a comment first", '<!-- <a rel="webmention" href="/no"> --><a rel="webmention" href="/end">'],
    ["one as text first", '<pre>&lt;a rel="webmention" href="/no"&gt;</pre><a rel="webmention" href="/end">'],
  ])("reads the page: %s", (_, html) => expect(page(html)).toBe(END));

  it("takes an empty address for the page itself, and keeps what is asked for in an address", () => {
    expect(page('<link rel="webmention" href="">')).toBe(URL_OF_PAGE);
    expect(page("", ["<>; rel=webmention"])).toBe(URL_OF_PAGE);
    expect(page('<a rel="webmention" href="?to=1">')).toBe("https://notes.example/posts/one?to=1");
  });

  it.each([
    ["nothing", "<p>", [], "text/html"],
    [
      "rel of another name",
      '<link rel="not-webmention" href="/no">',
      ["</no>; rel=webmentions"],
      "text/html",
    ],
    ["another page's", "", ['</no>; anchor="/other"; rel=webmention'], "text/html"],
    ["a rel in the address", '<a href="/?rel=webmention">', ["</?rel=webmention>; rel=x"], "text/html"],
    ["HTML that calls itself text", '<link rel="webmention" href="/no">', [], "text/plain"],
    ["no address at all", '<link rel="webmention" href="http://[">', [], "text/html"],
    [
      "another element",
      '<area rel="webmention" href="/no"><form rel="webmention" action="/no">',
      [],
      "text/html",
    ],
  ])("finds none where there is %s", (_, html, links, type) => expect(page(html, links, type)).toBeNull());
});

describe("outwardLinks", () => {
  it("are pages elsewhere, each once", () => {
    const html =
      '<a href="https://a.example/1">x</a><a href="https://a.example/1">y</a><a href="/own"><a href="#s-1">' +
      '<a href="https://swale.example/plates/a"><a href="mailto:x@a.example"><a href="http://b.example/?q=1&amp;r=2">';
    expect(outwardLinks(html, "https://swale.example")).toEqual([
      "https://a.example/1",
      "http://b.example/?q=1&r=2",
    ]);
  });

  it("are fifty at most", () => {
    const html = Array.from({ length: 80 }, (_, i) => `<a href="https://a.example/${i}">`).join("");
    expect(outwardLinks(html, "https://swale.example")).toHaveLength(50);
  });
});
