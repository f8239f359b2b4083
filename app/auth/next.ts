/** Where to go after signing in or out: a path of this site, never another one. */

const FALLBACK = "/projects";
/** Only the origin part is thrown away again; it merely lets the address be parsed as a browser would. */
const ANY_ORIGIN = "http://swale.invalid";

/** The wish where it is a path of this site, else the fallback. */
export function safePath(wish: unknown, fallback = FALLBACK): string {
  if (typeof wish !== "string" || !wish.startsWith("/") || wish.length > 2000) return fallback;
  if (!URL.canParse(wish, ANY_ORIGIN)) return fallback;
  // Browsers read a backslash as a slash and drop tabs and line ends: judged after parsing, as they do.
  const url = new URL(wish, ANY_ORIGIN);
  if (url.origin !== ANY_ORIGIN || url.pathname.startsWith("//")) return fallback;
  return url.pathname + url.search + url.hash;
}
