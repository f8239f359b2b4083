import * as benchReferences from "~/db/bench-references.server";
import { brokenForm } from "~/errors";
import { MAX_FILE_BYTES } from "~/readers/reading";
import { type ReferenceFile, sameFileTwice } from "~/services/bench-references.server";

/** A form with reference sweeps: its words, its files by kind, and what is wrong with the files. */
export interface BenchForm {
  fields: FormData;
  files: ReferenceFile[];
  fault: string | null;
}

/** Takes a form apart; one that was cut short on its way is refused plainly. */
export async function readBenchForm(request: Request): Promise<BenchForm> {
  const form = await request.formData().catch(() => {
    throw brokenForm();
  });
  const fields = new FormData();
  const files: ReferenceFile[] = [];
  for (const [name, value] of form) {
    if (typeof value === "string") {
      fields.append(name, value);
      continue;
    }
    const kind = benchReferences.REFERENCE_KINDS.find((known) => known === name);
    if (!kind || value.name === "" || files.some((file) => file.kind === kind)) continue;
    files.push({ kind, file: { name: value.name, bytes: new Uint8Array(await value.arrayBuffer()) } });
  }
  return { fields, files, fault: faultOf(files) };
}

function faultOf(files: ReferenceFile[]): string | null {
  const large = files.find(({ file }) => file.bytes.length > MAX_FILE_BYTES);
  if (large) return `The ${large.kind} has more than 64 MB. Nothing was stored.`;
  const same = sameFileTwice(files);
  if (!same) return null;
  return `The ${same[0]} and the ${same[1]} are the same file. Nothing was stored: choose the sweep of each standard.`;
}
