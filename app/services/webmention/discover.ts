import { Parser } from "htmlparser2";

/** Where a page wants to be told that it was mentioned: W3C Webmention 3.1.2. Pure. */

export interface Page {
  /** Where it came from, after redirects. */
  url: string;
  mediaType: string;
  text: string;
  /** Its `Link` headers, as they came. */
  links: readonly string[];
}

/** The first of the header, else the first `<link>` or `<a>` of the page; null where there is none. */
export function endpointOf(page: Page): string | null {
  const found = inHeaders(page) ?? (/html/.test(page.mediaType) ? inHtml(page.text) : null);
  return found !== null && URL.canParse(found, page.url) ? new URL(found, page.url).href : null;
}

function inHeaders({ links, url }: Page): string | null {
  for (const { address, parameters } of links.flatMap(linksOf)) {
    // A link from another place is none of this page (RFC 8288 3.2).
    const anchor = parameters.get("anchor");
    const here = anchor === undefined || (URL.canParse(anchor, url) && new URL(anchor, url).href === url);
    if (here && isWebmention(parameters.get("rel"))) return address;
  }
  return null;
}

/** A `Link` header in its links (RFC 8288 3): `<address>; name=value; name="value"`, …. */
function linksOf(header: string): { address: string; parameters: Map<string, string> }[] {
  return [...header.matchAll(LINK)].map(([, address, rest]) => {
    const parameters = new Map<string, string>();
    for (const [, name, quoted, plain] of rest.matchAll(PARAMETER)) {
      const key = name.toLowerCase();
      // The first of a name counts.
      if (!parameters.has(key)) parameters.set(key, quoted?.replace(/\\(.)/g, "$1") ?? plain ?? "");
    }
    return { address: address.trim(), parameters };
  });
}

function inHtml(html: string): string | null {
  let found: string | null = null;
  const parser = new Parser({
    onopentag(name, { href, rel }) {
      // Without an address it is no link; an empty one is the page itself.
      if (found !== null || href === undefined || (name !== "link" && name !== "a")) return;
      if (isWebmention(rel)) found = href.trim();
    },
  });
  parser.end(html);
  return found;
}

function isWebmention(rel: string | undefined): boolean {
  return (rel ?? "").toLowerCase().split(/\s+/).includes("webmention");
}

const LINK = /<([^<>]*)>((?:\s*;\s*[\w!#$%&'*+.^`|~-]+\s*(?:=\s*(?:"(?:[^"\\]|\\.)*"|[^\s",;]*))?)*)/g;
const PARAMETER = /;\s*([\w!#$%&'*+.^`|~-]+)\s*(?:=\s*(?:"((?:[^"\\]|\\.)*)"|([^\s",;]*)))?/g;
