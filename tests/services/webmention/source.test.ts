import { describe, expect, it } from "vitest";
import { readSource } from "~/services/webmention/source";
import { targetOf } from "~/services/webmention/targets";

const HERE = "https://swale.example";
const TARGET = `${HERE}/plates/k3f9w2`;
const page = (text: string, mediaType = "text/html") =>
  readSource({ url: "https://notes.example/a/b", mediaType, text }, TARGET);

describe("readSource", () => {
  it.each([
    `<a href="${TARGET}">a plate</a>`,
    `<A HREF='${TARGET}'>`,
    `<a href=" ${TARGET} ">`,
    `<a href="HTTPS://SWALE.EXAMPLE/plates/k3f9w2">`,
    `<img src="${TARGET}">`,
    `<video src="${TARGET}"></video>`,
    `<video poster="${TARGET}"></video>`,
    `<object data="${TARGET}"></object>`,
    `<iframe src="${TARGET}"></iframe>`,
    `<blockquote cite="${TARGET}">`,
    `<img srcset="/small.png 1x, ${TARGET} 2x">`,
    `<link rel="alternate" href="${TARGET}">`,
    `<base href="${HERE}/plates/"><a href="k3f9w2">`,
    `<p>never closed <div><a href="${TARGET}"`.concat(">"),
  ])("finds the link in %s", (html) => expect(page(html).links).toBe(true));

  it.each([
    TARGET,
    `<p>${TARGET}</p>`,
    `<!-- <a href="${TARGET}"> -->`,
    `&lt;a href="${TARGET}"&gt;`,
    `<a href="${TARGET}x">`,
    `<a href="${TARGET}?version=2">`,
    `<a href="https://other.example/plates/k3f9w2">`,
    `<a href="/plates/k3f9w2">`,
    `<a title="${TARGET}">`,
    `<script>const a = '<a href="${TARGET}">'</script>`,
    `<textarea><a href="${TARGET}"></textarea>`,
    `<base href="${TARGET}">`,
    "",
  ])("finds none in %s", (html) => expect(page(html).links).toBe(false));

  it("reads values of JSON and words of plain text", () => {
    expect(page(JSON.stringify({ a: [{ b: TARGET }] }), "application/json").links).toBe(true);
    expect(page(JSON.stringify({ [TARGET]: 1, b: `see ${TARGET}` }), "application/ld+json").links).toBe(
      false,
    );
    expect(page("{", "application/json").links).toBe(false);
    expect(page(`${"[".repeat(5000)}"${TARGET}"${"]".repeat(5000)}`, "application/json").links).toBe(true);
    expect(page(`See ${TARGET}.`, "text/plain").links).toBe(true);
    expect(page(`<${TARGET}>`, "text/plain").links).toBe(true);
    expect(page(`${TARGET}/more`, "text/plain").links).toBe(false);
    expect(page(`https://other.example/?${TARGET}x`, "text/plain").links).toBe(false);
  });

  it("is done soon with a megabyte that is made to take long", () => {
    const many = (text: string) => text.repeat(Math.floor(1_000_000 / text.length));
    // Each of these kept a processor busy for more than ten seconds.
    expect(page(many(`x${TARGET}`), "text/plain").links).toBe(false);
    expect(
      page(`<base href="https://a.example/${"a".repeat(400_000)}">${"<a href=x>".repeat(50_000)}`).links,
    ).toBe(false);
    expect(page(many(`<a href=x>`)).links).toBe(false);
    expect(page(`<a href="${TARGET}">${many("<a href=x>")}`).links).toBe(true);
  });

  it("reads how the page calls itself, in bounds", () => {
    expect(page("<title>\n Reeds &amp; <b>radials\n</title><title>no</title>").title).toBe(
      "Reeds & <b>radials",
    );
    expect(page(`<title>${"x".repeat(5000)}</title>`).title).toHaveLength(200);
    expect(page("<svg><title>drawing</title></svg>").title).toBe("drawing");
    expect(page(JSON.stringify({ name: "Reeds" }), "application/json").title).toBe("Reeds");
    expect(page("<p>").title).toBe("");
  });
});

describe("targetOf", () => {
  it("knows plates and write-ups of this origin alone", () => {
    expect(targetOf(TARGET, HERE)).toEqual({ kind: "plate", publicId: "k3f9w2" });
    expect(targetOf(`${HERE}/write-ups/abc?version=2#s-end`, HERE)).toEqual({
      kind: "write-up",
      publicId: "abc",
    });
    for (const no of [
      `${HERE}/projects/k3f9w2`,
      `${HERE}/plates/k3f9w2.svg`,
      `${HERE}/plates/k3f9w2/embed`,
      `${HERE}/plates/`,
      "https://other.example/plates/k3f9w2",
      "http://swale.example/plates/k3f9w2",
      "https://x@swale.example/plates/k3f9w2",
      "/plates/k3f9w2",
      "",
    ]) {
      expect(targetOf(no, HERE), no).toBeNull();
    }
  });
});
