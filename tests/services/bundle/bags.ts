import { createHash } from "node:crypto";
import { mkdtempSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { KIND_NAMES } from "~/db/bundle-kinds.server";
import { writeDirectory, writeEntry, type ZipState } from "~/services/bundle/zip-writer";

export type Files = Record<string, string | Buffer>;

/** The payload of the smallest bundle there is: a project without anything. */
export function payload(): Files {
  const project = {
    id: "k3fk3fk3fk",
    title: "Reeds",
    summary: "",
    visibility: "private",
    ituRegion: null,
    demo: 0,
    licence: "CC-BY-4.0",
    createdAt: "2026-05-03T00:00:00.000Z",
    updatedAt: "2026-05-03T00:00:00.000Z",
  };
  const records = (kind: string, lines: object[] = []) =>
    `{"kind":"${kind}","format":1,"records":[\n${lines.map((line) => JSON.stringify(line)).join(",\n")}\n]}\n`;
  const files: Files = { "data/records/people.json": records("people") };
  for (const kind of KIND_NAMES)
    files[`data/records/${kind}.json`] = records(kind, kind === "project" ? [project] : []);
  return files;
}

/** A payload as a bag, with right sums. */
export function bagOf(files: Files, info = "Swale-Bundle-Format: 1\n"): Files {
  const sum = (bytes: string | Buffer) => createHash("sha256").update(bytes).digest("hex");
  const manifest = (of: Files) =>
    Object.entries(of)
      .map(([name, bytes]) => `${sum(bytes)}  ${name}\n`)
      .join("");
  const tags: Files = {
    "bagit.txt": "BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n",
    "bag-info.txt": info,
    "manifest-sha256.txt": manifest(files),
  };
  return { ...files, ...tags, "tagmanifest-sha256.txt": manifest(tags) };
}

/** Entries as a ZIP, in the order given; a name may be there twice. */
export async function zipOf(entries: [string, string | Buffer][], base = "bag/"): Promise<Buffer> {
  const chunks: Buffer[] = [];
  const sink = async (bytes: Buffer) => void chunks.push(Buffer.from(bytes));
  const state: ZipState = { offset: 0, entries: [] };
  const at = new Date("2026-05-03");
  for (const [name, bytes] of entries) {
    await writeEntry(state, { path: base + name, packed: true, at }, [Buffer.from(bytes as string)], sink);
  }
  await writeDirectory(state, at, sink);
  return Buffer.concat(chunks);
}

const folder = mkdtempSync(path.join(tmpdir(), "bags-"));
let written = 0;

export function fileOf(bytes: Buffer): string {
  const file = path.join(folder, `${++written}.zip`);
  writeFileSync(file, bytes);
  return file;
}
