import { Parser } from "htmlparser2";

/** Does another's page say what it claims? W3C Webmention 3.2.2. Pure. */

export interface Source {
  /** Where it came from, after redirects. */
  url: string;
  mediaType: string;
  text: string;
}

export interface Claim {
  links: boolean;
  /** As the page calls itself; empty where it does not. */
  title: string;
}

/** HTML: an address in an attribute that names one; JSON: a value; plain text: the address as a word of its own. */
export function readSource({ url, mediaType, text }: Source, target: string): Claim {
  if (mediaType.endsWith("json")) return readJson(text, target);
  if (mediaType === "text/plain") return { links: hasWord(text, target), title: "" };
  return readHtml(text, url, target);
}

function readHtml(html: string, url: string, target: string): Claim {
  let base = url;
  let links = false;
  let inTitle = false;
  let title = "";
  const wanted = new URL(target).href;
  let looked = 0;
  const isWanted = (address: string) => {
    const text = address.trim();
    // What is asked of one page is bounded: it may be made of nothing but addresses.
    if (text.length > LONGEST_ADDRESS || ++looked > MOST_ADDRESSES) return false;
    return URL.canParse(text, base) && new URL(text, base).href === wanted;
  };
  const parser = new Parser({
    onopentag(name, attributes) {
      if (name === "title" && title === "") inTitle = true;
      if (name === "base" && base === url && attributes.href && attributes.href.length <= LONGEST_ADDRESS) {
        if (URL.canParse(attributes.href, url)) base = new URL(attributes.href, url).href;
      }
      if (name === "base") return;
      links ||= NAMING.some((key) => attributes[key] !== undefined && isWanted(attributes[key]));
      links ||= (attributes.srcset ?? "").split(",").some((one) => isWanted(one.trim().split(/\s/)[0]));
    },
    ontext(text) {
      if (inTitle && title.length < LONGEST_TITLE) title += text;
    },
    onclosetag(name) {
      if (name === "title") inTitle = false;
    },
  });
  parser.end(html);
  return { links, title: tidy(title) };
}

function readJson(text: string, target: string): Claim {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return { links: false, title: "" };
  }
  const own = value !== null && typeof value === "object" ? (value as Record<string, unknown>) : {};
  const title = [own.title, own.name].find((one) => typeof one === "string");
  return { links: holds(value, target), title: tidy(String(title ?? "")) };
}

/** Without recursion: what came may be nested as deep as it likes. */
function holds(value: unknown, target: string): boolean {
  const left = [value];
  while (left.length > 0) {
    const one = left.pop();
    if (one === target) return true;
    if (one !== null && typeof one === "object") for (const inner of Object.values(one)) left.push(inner);
  }
  return false;
}

function hasWord(text: string, target: string): boolean {
  for (let at = text.indexOf(target); at >= 0; at = text.indexOf(target, at + 1)) {
    if (at > 0 && /[\w/:.-]/.test(text[at - 1])) continue;
    // A full stop or a comma ends a sentence, not an address.
    ENDING.lastIndex = at + target.length;
    if (ENDING.test(text)) return true;
  }
  return false;
}

function tidy(title: string): string {
  return title
    .replace(/[\s\p{C}]+/gu, " ")
    .trim()
    .slice(0, LONGEST_TITLE);
}

/** Attributes of HTML that hold one address. */
const NAMING = ["href", "src", "cite", "data", "poster"];
const ENDING = /[.,;:!?)]*(?:[\s<>"'\])]|$)/y;
const LONGEST_TITLE = 200;
/** Of what is taken as a target, too. */
const LONGEST_ADDRESS = 2000;
/** In a megabyte of HTML: a long list of links has some thousands (common practice, no source). */
const MOST_ADDRESSES = 20_000;
