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
  let harmless = true;
  const refuse = () => {
    harmless = false;
  };
  const parser = new Parser(
    {
      onopentag: (name, attributes) => {
        if (!elements.has(name.toLowerCase())) refuse();
        for (const [key, value] of Object.entries(attributes)) {
          const attribute = key.toLowerCase();
          if (attribute.startsWith("on") || attribute === "http-equiv" || FETCHES.test(value)) refuse();
          if (ADDRESS.test(attribute) && !ALLOWED.test(value)) refuse();
          if (attribute === "rel" && value !== "canonical") refuse();
        }
      },
      ontext: (words) => {
        if (FETCHES.test(words)) refuse();
      },
      oncomment: refuse,
      oncdatastart: refuse,
      onprocessinginstruction: refuse,
    },
    { xmlMode, decodeEntities: true },
  );
  parser.end(text);
  return harmless;
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
/** Inside the page, a page of this site or another, a picture that is carried along. */
const ALLOWED = /^(#|https?:\/\/|\/(?!\/)|data:image\/png;base64,)/;
/** In styles and in attributes: only what is inside the drawing, and fonts that it carries. */
const FETCHES =
  /@import|expression\s*\(|javascript:|-moz-binding|url\(\s*["']?\s*(?!#|data:(font|application\/font|image\/png))/i;
