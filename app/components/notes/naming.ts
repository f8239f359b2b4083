/** What is being named where the caret stands: `@ad…` a person, `#7.0…` a thing of the project. */
export interface Naming {
  of: "people" | "things";
  /** What was typed after the sign. */
  q: string;
  /** Where the sign stands. */
  from: number;
}

/** The naming that the caret is in; null where it is in none. */
export function namingAt(text: string, caret: number): Naming | null {
  const match = BEGUN.exec(text.slice(Math.max(0, caret - LONGEST), caret));
  if (!match) return null;
  const [, sign, q] = match;
  return { of: sign === "@" ? "people" : "things", q, from: caret - q.length - 1 };
}

/** The text with the suggestion in the place of what was typed, and where the caret then stands. */
export function completed(text: string, { from, q }: Naming, insert: string): [text: string, caret: number] {
  const after = text.slice(from + 1 + q.length);
  const space = /^\s/.test(after) ? "" : " ";
  return [`${text.slice(0, from)}${insert}${space}${after}`, from + insert.length + 1];
}

/** `https://this.site/projects/p/dips/d` of this project → `#dip:d`; null for any other text. */
export function asReference(pasted: string, origin: string, projectId: string): string | null {
  const match = ADDRESS.exec(pasted.trim());
  if (!match || match[1] !== origin) return null;
  const [, , project, folder, subject, plate] = match;
  if (plate) return `#plate:${plate}`;
  return project === projectId ? `#${KIND_OF[folder]}:${subject}` : null;
}

const BEGUN = /(?:^|[\s(,;])([@#])([^\s@#]{0,40})$/;
const LONGEST = 60;
const ADDRESS =
  /^(https?:\/\/[^/\s]+)\/(?:projects\/([0-9a-z]+)\/(dips|sweeps|steps)\/([0-9a-z]+)|plates\/([0-9a-z]+))\/?(?:[?#]\S*)?$/;
const KIND_OF: Record<string, string> = { dips: "dip", sweeps: "sweep", steps: "step" };
