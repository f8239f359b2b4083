import { FROM_BUNDLE } from "~/db/shown-name.server";

/**
 * Who wrote what in a bundle need not have an account where it is taken in. Such persons are kept by name, marked so that
 * nobody takes them for one who has: a row that nobody can sign in to.
 */
const MARK = " (from a bundle)";
const LONGEST = 120;

export function placeholderOf(name: string, publicId: string) {
  const short = Array.from(name.trim() || "Somebody")
    .slice(0, LONGEST - MARK.length)
    .join("");
  return { name: short + MARK, userName: `${FROM_BUNDLE}${publicId}`, email: null };
}

/** The name as it was before it was marked: a bundle of what came from a bundle says the same. */
export function nameOfPerson({ name, userName }: { name: string; userName: string }): string {
  return userName.startsWith(FROM_BUNDLE) && name.endsWith(MARK) ? name.slice(0, -MARK.length) : name;
}
