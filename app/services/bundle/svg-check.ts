import { Parser } from "htmlparser2";

/**
 * Whether a drawing that came from elsewhere holds nothing that would run or fetch: only the elements that figures are made
 * of, no handlers, no addresses but those of pages. It is looked at as XML and as HTML, for it is shown as both.
 */
export function isHarmlessSvg(svg: string): boolean {
  if (!/^\s*(<\?xml[^<>]*\?>\s*)?<svg[\s>]/.test(svg)) return false;
  const bare = svg.replace(/^\s*<\?xml[^<>]*\?>/, "");
  return passes(bare, FIGURE, true) && passes(bare, FIGURE, false);
}

/** The same of a page that shows a figure and nothing else. */
export function isHarmlessPage(html: string): boolean {
  return /^<!DOCTYPE html>\s*<html/i.test(html) && passes(html.replace(/^<!DOCTYPE html>/i, ""), PAGE, false);
}

function passes(text: string, elements: ReadonlySet<string>, xmlMode: boolean): boolean {
  // Where every sign of a tag begins one, nobody can see another tag than is seen here, whatever is text to whom.
  if (/<[^<>]*(?:<|$)/.test(text)) return false;
  let harmless = true;
  let styles = "";
  let inStyle = 0;
  const refuse = () => {
    harmless = false;
  };
  const parser = new Parser(
    {
      onopentag: (name, attributes) => {
        if (!elements.has(name.toLowerCase())) refuse();
        if (name.toLowerCase() === "style") inStyle++;
        for (const [key, value] of Object.entries(attributes)) {
          const attribute = key.toLowerCase();
          if (attribute.startsWith("on") || attribute === "http-equiv") refuse();
          if (!WORDS.has(attribute) && FETCHES.test(value)) refuse();
          const allowed = LEADS.has(name.toLowerCase()) ? ALLOWED_TO_LEAD : ALLOWED_TO_LOAD;
          if (ADDRESS.test(attribute) && !allowed.test(value)) refuse();
          if (attribute === "rel" && value !== "canonical") refuse();
        }
      },
      onclosetag: (name) => {
        if (name.toLowerCase() === "style") inStyle--;
      },
      // In pieces, parted wherever a sign was written as a reference.
      ontext: (piece) => {
        if (inStyle > 0) styles += piece;
      },
      oncomment: refuse,
      oncdatastart: refuse,
      onprocessinginstruction: refuse,
    },
    { xmlMode, decodeEntities: true },
  );
  parser.end(text);
  return harmless && !FETCHES.test(styles);
}

const FIGURE = new Set([
  ...["svg", "g", "path", "rect", "circle", "ellipse", "line", "polyline", "polygon", "text", "tspan"],
  ...["title", "desc", "defs", "clippath", "mask", "lineargradient", "radialgradient", "stop", "pattern"],
  ...["marker", "symbol", "use", "a", "style", "image"],
]);
const PAGE = new Set([
  ...["html", "head", "meta", "title", "link", "style", "body"],
  ...["a", "p", "picture", "source", "img"],
]);
const ADDRESS = /(^|:)(href|src|srcset|action|formaction|data|poster)$/;
/** Attributes that hold what a person wrote, and nothing else. */
const WORDS = new Set(["alt", "title", "content", "aria-label"]);
/** What leads to another page when a person follows it; every other address is loaded at once. */
const LEADS = new Set(["a", "link"]);
/** Inside the page, a page of this site or another. */
const ALLOWED_TO_LEAD = /^(#|https?:\/\/|\/(?!\/|\\))/;
/** Inside the page, what this site has, a picture that is carried along. */
const ALLOWED_TO_LOAD = /^(#|\/(?!\/|\\)[^,]*$|data:image\/png;base64,)/;
/** In styles and attributes: only what is inside the drawing, and fonts that it carries. A backslash would spell these another way. */
const FETCHES =
  /\\|@import|expression\s*\(|javascript:|-moz-binding|image-set|\bsrc\(|url\(\s*["']?\s*(?!#|data:(font|application\/font|image\/png))/i;
