import { promisify } from "node:util";
import { gzip } from "node:zlib";
import { LRUCache } from "lru-cache";
import * as plates from "~/db/plates.server";
import { getObject, sha256Of } from "../storage.server.ts";
import type { FormName } from "./form-names.ts";

export interface StoredForm {
  bytes: Buffer;
  mediaType: string;
  sha256: string;
  /** Of text that is worth it. */
  gzipped: Buffer | null;
}

/**
 * A frozen form, as it was stored: from memory where it is there, with a look every few seconds whether the plate still
 * stands. Undefined where there is no such plate or it has no such form. Throws where the store gives back other bytes.
 */
export async function readForm(
  publicId: string,
  form: FormName,
): Promise<StoredForm | "withdrawn" | undefined> {
  const key = `${publicId} ${form}`;
  const known = kept.get(key);
  if (known && Date.now() - known.checkedMs < CHECK_EVERY_MS) return known.form;
  const found = await plates.findForm(publicId, form);
  if (!found || found.withdrawnAt || !found.form) {
    kept.delete(key);
    return found?.withdrawnAt ? "withdrawn" : undefined;
  }
  const { sha256 } = found.form;
  const whole = known?.form.sha256 === sha256 ? known.form : await fetchForm(found.form);
  kept.set(key, { form: whole, checkedMs: Date.now() });
  return whole;
}

/** A plate that was withdrawn in this process is gone from it at once. */
export function forgetForms(publicId: string): void {
  for (const key of [...kept.keys()]) if (key.startsWith(`${publicId} `)) kept.delete(key);
}

async function fetchForm({ storageKey, sha256, mediaType }: plates.PlateFormRow): Promise<StoredForm> {
  const bytes = Buffer.from(await getObject(storageKey));
  if (sha256Of(bytes) !== sha256)
    throw new Error(`The store holds other bytes than were frozen as ${storageKey}.`);
  const packed = PACKED.test(mediaType) && bytes.length > 1000 ? await pack(bytes, { level: 9 }) : null;
  return { bytes, mediaType, sha256, gzipped: packed };
}

const pack = promisify<Buffer, { level: number }, Buffer>(gzip);
const PACKED = /^(?:text\/|image\/svg|application\/(?:json|x-bibtex|vnd\.citationstyles))/;
const CHECK_EVERY_MS = 5_000;
const kept = new LRUCache<string, { form: StoredForm; checkedMs: number }>({
  maxSize: 64 * 1024 * 1024,
  maxEntrySize: 4 * 1024 * 1024,
  sizeCalculation: ({ form }) => form.bytes.length + (form.gzipped?.length ?? 0) + 200,
});
