import type { Publication } from "./published.server.ts";

/** How a published write-up is spoken of wherever it is taken: one wording for page, file and print. Pure. */

/** Who began it and who published it, each once. */
export function peopleOf({ writer, by }: Pick<Publication, "writer" | "by">): string[] {
  return [...new Set([writer ?? by ?? "former member", by ?? "former member"])];
}

/** Its address for good; an older version with its number. */
export function addressOf({ writeUp, version }: Publication, origin: string): string {
  const address = `${origin}/write-ups/${writeUp.publicId}`;
  return version.number === writeUp.publishedNumber ? address : `${address}?version=${version.number}`;
}

/** `where-the-dip-comes-from-v2` */
export function fileNameOf({ version }: Pick<Publication, "version">): string {
  const words = version.title
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-");
  return `${words.slice(0, 60).replace(/^-+|-+$/g, "") || "write-up"}-v${version.number}`;
}

/** Sources: ITU Radio Regulations No. 18.1 (licence); exposure limits as set by regulators, e.g. 47 CFR 1.1310. */
export const CAUTION =
  "Transmit only where your licence and local rules allow; never transmit into an analyser, a bridge or near people: exposure limits are set by local regulators. Keep masts and wires away from power lines and take them down before lightning. Numbers are as good as the bench they were taken with.";

export const INVENTED = "The people, places, call signs and numbers of this project are invented.";
