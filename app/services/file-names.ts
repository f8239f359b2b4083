/** Names that people's files carry: kept as they are as far as they deceive nobody and every system takes them. */

/**
 * Control characters, and the marks that turn the direction of writing: with them `gpj.exe` can be made to look like
 * a picture's name.
 */
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must go
const DECEIVING = /[\u0000-\u001f\u007f-\u009f\u061c\u200e\u200f\u202a-\u202e\u2066-\u2069]/g;
const LONGEST = 255;
const LONGEST_ENDING = 12;

/** Without what deceives; the space around it goes too. */
export function plainText(text: string): string {
  return text.replace(DECEIVING, "").trim();
}

/** The last part of a path as a name of at most 255 characters that keeps its ending. */
export function cleanFileName(name: string): string {
  const last = plainText(name.split(/[\\/]/).pop() ?? "");
  const characters = Array.from(last);
  if (characters.length <= LONGEST) return last || "unnamed";
  const ending = /\.[^.]+$/.exec(last)?.[0] ?? "";
  const kept = ending.length <= LONGEST_ENDING ? ending : "";
  return characters.slice(0, LONGEST - kept.length).join("") + kept;
}

/** A sweep's title after its file: without folders and ending. */
export function titleFromFileName(name: string): string {
  const bare = cleanFileName(name)
    .replace(/\.[A-Za-z0-9]{1,5}$/, "")
    .replace(/_+/g, " ")
    .trim();
  return bare || "Unnamed sweep";
}

/** The `Content-Disposition` of a download; every character that RFC 8187 leaves out of `attr-char` is encoded. */
export function attachment(name: string): string {
  const safe = plainText(name).replace(/[\\/:*?"<>|]+/g, "-") || "unnamed";
  const encoded = encodeURIComponent(safe.replace(/\p{Surrogate}/gu, "\ufffd")).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename*=UTF-8''${encoded}`;
}
