/**
 * The plan of a bundle: every entry of its payload in order, one JSON line each, followed by the lines of its text where it
 * has one. It is written at one moment of the database and kept in the store until the bundle is made from it.
 */
export type PlanEntry = { path: string } & (
  | { from: "text" }
  | { from: "object"; key: string; sha256: string | null }
  | { from: "points"; reading: number; as: "csv" | "touchstone"; title: string }
  | { from: "preview"; preview: string }
);
export type PlanLine = PlanEntry | { text: string };

export function isEntry(line: PlanLine): line is PlanEntry {
  return "path" in line;
}

/** A text as an entry, in lines that are not too long to be held. */
export function* textEntry(path: string, text: string): Generator<PlanLine> {
  yield { path, from: "text" };
  for (let i = 0; i < text.length; i += CHUNK) yield { text: text.slice(i, i + CHUNK) };
}

/** A name that every file system takes and no other name of this bundle equals: the id stands before it. */
export function fileName(id: string, name: string): string {
  const plain = name
    .normalize("NFKD")
    .replace(/[^A-Za-z0-9.-]+/g, "-")
    .replace(/\.{2,}/g, ".")
    .replace(/^[-.]+|[-.]+$/g, "");
  const ending = /\.[A-Za-z0-9]{1,8}$/.exec(plain)?.[0] ?? "";
  const stem = plain.slice(0, plain.length - ending.length).slice(0, LONGEST_STEM);
  return `${id}-${stem || "file"}${ending}`;
}

const CHUNK = 64 * 1024;
const LONGEST_STEM = 60;
