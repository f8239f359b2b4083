/** Which of our addresses can be mentioned: a plate's and a write-up's own page. Pure. */

export interface Target {
  kind: "plate" | "write-up";
  publicId: string;
}

/** `origin` without a slash at the end. A question mark or a place on the page may follow. */
export function targetOf(address: string, origin: string): Target | null {
  if (!URL.canParse(address)) return null;
  const url = new URL(address);
  const [, kind, publicId] = PAGE.exec(url.pathname) ?? [];
  if (url.origin !== origin || url.username !== "" || url.password !== "" || !publicId) return null;
  return { kind: kind === "plates" ? "plate" : "write-up", publicId };
}

const PAGE = /^\/(plates|write-ups)\/([0-9a-z]{1,16})\/?$/;
