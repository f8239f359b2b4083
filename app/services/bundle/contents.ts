import type { BundleKind } from "~/db/bundle-kinds.server";
import type { Row } from "~/db/bundle-rows.server";
import { fileName, type PlanLine, textEntry } from "./plan.ts";

/** What belongs to a row beside its columns: bytes of their own in the bundle, and the fields that say where. */
export interface Contents {
  fields: Record<string, string | number | null>;
  lines: PlanLine[];
}

/** `head`: the first bytes of a reading's points. `named`: public ids of what the row names, by field. */
export function contentsOf(
  kind: BundleKind["name"],
  row: Row,
  named: Record<string, unknown>,
  head?: Buffer,
): Contents {
  const id = String(row.publicId);
  const name = String(row.name);
  const object = (path: string, key: unknown, sha256: unknown = null): PlanLine => ({
    path,
    from: "object",
    key: String(key),
    sha256: sha256 as string | null,
  });
  switch (kind) {
    case "originals": {
      const path = `data/originals/${fileName(id, name)}`;
      return { fields: { path }, lines: [object(path, row.storageKey, row.sha256)] };
    }
    case "readings":
      return pointsOf(row, String(named.sweep), head);
    case "photographs":
    case "attachments":
      return pictureOf(kind, row, object);
    case "plates": {
      const recordPath = `data/plates/${id}/record.json`;
      return { fields: { recordPath }, lines: [...textEntry(recordPath, String(row.record))] };
    }
    case "plate-forms": {
      const ending = ENDINGS[String(row.mediaType).split(";")[0]] ?? "bin";
      const path = `data/plates/${named.plate}/${row.form}.${ending}`;
      return { fields: { path }, lines: [object(path, row.storageKey, row.sha256)] };
    }
    case "plate-sources": {
      const path = `data/plates/sources/${row.sha256}`;
      return { fields: { path }, lines: [object(path, row.storageKey, row.sha256)] };
    }
    default:
      return { fields: {}, lines: [] };
  }
}

function pointsOf(row: Row, sweep: string, head: Buffer | undefined): Contents {
  if (!head) {
    return { fields: { pointsPath: null, touchstonePath: null, referenceOhm: null }, lines: [] };
  }
  // Format, flags and reference stand at the head of stored points.
  const complex = (head.readUInt8(1) & 1) === 1;
  const stem = `data/points/${sweep}-reading-${row.number}`;
  const points = { from: "points" as const, reading: Number(row.id), title: sweep };
  const lines: PlanLine[] = [{ path: `${stem}.csv`, as: "csv", ...points }];
  if (complex) lines.push({ path: `${stem}.s1p`, as: "touchstone", ...points });
  const touchstonePath = complex ? `${stem}.s1p` : null;
  return {
    fields: { pointsPath: `${stem}.csv`, touchstonePath, referenceOhm: head.readDoubleLE(8) },
    lines,
  };
}

function pictureOf(
  kind: "photographs" | "attachments",
  row: Row,
  object: (path: string, key: unknown, sha256?: unknown) => PlanLine,
): Contents {
  const id = String(row.publicId);
  const path = `data/${kind}/${fileName(id, String(row.name))}`;
  const fields: Contents["fields"] = { path, shownPath: null, smallPath: null };
  const lines = [object(path, row.storageKey, row.sha256)];
  for (const [field, key, ending] of [
    ["shownPath", row.shownKey, "shown"],
    ["smallPath", row.smallKey, "small"],
  ] as const) {
    if (!key) continue;
    fields[field] = `data/${kind}/copies/${id}-${ending}.jpg`;
    lines.push(object(fields[field], key));
  }
  return { fields, lines };
}

const ENDINGS: Record<string, string> = {
  "image/svg+xml": "svg",
  "image/png": "png",
  "application/pdf": "pdf",
  "text/csv": "csv",
  "application/json": "json",
  "application/vnd.citationstyles.csl+json": "csl.json",
  "application/x-bibtex": "bib",
  "text/x-bibtex": "bib",
  "text/plain": "txt",
  "text/html": "html",
};
