import { plainText } from "../file-names.ts";

/** Names of files in folders and archives. Pure. */

/** A path that stays in its folder, tidied; or why it is refused. */
export function safePath(name: string): { path: string } | { refused: string } {
  const path = plainText(name).replace(/^(\.\/)+/, "");
  if (path === "") return NAMELESS;
  if (/^[\\/]/.test(path) || /^[A-Za-z]:/.test(path)) {
    return { refused: "Its name begins outside of the archive (an absolute path). It was not unpacked." };
  }
  if (path.includes("\\")) {
    return {
      refused: "Its name has a backslash, which leads elsewhere on some systems. It was not unpacked.",
    };
  }
  if (path.split("/").some((part) => part === "..")) {
    return { refused: "Its name climbs out of the archive (..). It was not unpacked." };
  }
  if (path.length > LONGEST) return { refused: `Its name has more than ${LONGEST} characters.` };
  const tidy = path.split("/").filter((part) => part !== "" && part !== ".");
  return tidy.length > 0 ? { path: tidy.join("/") } : NAMELESS;
}

/** What systems leave in folders and nobody means to send. */
export function isOfSystem(path: string): boolean {
  return path
    .split("/")
    .some(
      (part) =>
        part === "__MACOSX" || part === "Thumbs.db" || part === "desktop.ini" || /^\.(?!\.?$)/.test(part),
    );
}

const NAMELESS = { refused: "It has no name." };
const LONGEST = 400;
