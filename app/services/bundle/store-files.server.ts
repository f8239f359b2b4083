import type { KindName } from "~/db/bundle-kinds.server";
import type { Row } from "~/db/bundle-rows.server";
import { newPublicId } from "~/db/ids.server";
import { pairOf } from "~/db/webmentions.server";
import { env } from "~/env.server";
import { MEDIA_TYPES } from "../plates/form-names.ts";
import { plateRecord } from "../plates/record.ts";
import { putObject } from "../storage.server.ts";
import { targetOf } from "../webmention/targets.ts";
import type { NewIds } from "./new-ids.server.ts";
import type { OpenBag } from "./open-zip.server.ts";
import type { Rec } from "./records.ts";
import { Refused } from "./refused.ts";
import { isHarmlessPage, isHarmlessSvg } from "./svg-check.ts";

/** Where the bytes of a bundle's records go in the store, and by which key a row is known here. */
export class KeyMaker {
  /** SHA-256 → key of what several records share: an original, and a plate that rests on it. */
  private readonly shared = new Map<string, string>();
  readonly stored = new Set<string>();
  private readonly pairs = new Set<string>();

  constructor(
    private readonly projectPublicId: string,
    private readonly ids: NewIds,
  ) {}

  /** The columns that say so; none for most kinds. */
  columnsOf(kind: KindName, record: Rec): Row {
    switch (kind) {
      case "originals":
      case "plate-sources": {
        const sum = String(record.sha256);
        const key = this.shared.get(sum) ?? this.fresh("originals");
        this.shared.set(sum, key);
        return { storageKey: key };
      }
      case "photographs":
      case "attachments": {
        const key = this.fresh(kind);
        const copy = (field: string, ending: string) => (record[field] === null ? null : `${key}.${ending}`);
        return {
          storageKey: key,
          shownKey: copy("shownPath", "shown"),
          smallKey: copy("smallPath", "small"),
        };
      }
      case "plate-forms":
        return { storageKey: this.fresh("plates", this.ids.of("plates", String(record.plate))) };
      case "mentions":
        return { pairSha256: this.pairOf(record) };
      default:
        return {};
    }
  }

  /** One that came to this very address is known when it comes again. What came elsewhere is kept, and is nobody's double. */
  private pairOf({ id, source, target, plate, writeUp }: Rec): string {
    const own = targetOf(String(target), env.BASE_URL);
    const here =
      plate === null ? this.ids.of("write-ups", String(writeUp)) : this.ids.of("plates", String(plate));
    const pair = pairOf(String(source), String(target));
    const known = own?.publicId === here && !this.pairs.has(pair);
    this.pairs.add(pair);
    return known ? pair : pairOf(`kept ${this.ids.of("mentions", String(id))} ${source}`, String(target));
  }

  private fresh(folder: string, owner = this.projectPublicId): string {
    return `${folder}/${owner}/${newPublicId()}${newPublicId()}`;
  }
}

/** Stores the bytes of one record, once each; what pages will show is looked at first. */
export async function storeFiles(
  bag: OpenBag,
  kind: KindName,
  record: Rec,
  row: Row,
  keys: KeyMaker,
): Promise<void> {
  if (kind === "plate-forms") {
    const bytes = await bytesOf(bag, String(record.path));
    checkForm(String(record.path), String(record.form), String(record.mediaType), bytes);
    await put(keys, String(row.storageKey), bytes, String(record.mediaType));
    return;
  }
  if (typeof row.storageKey === "string" && !keys.stored.has(row.storageKey)) {
    await put(keys, row.storageKey, await bytesOf(bag, String(record.path)), "application/octet-stream");
  }
  for (const [field, column] of [
    ["shownPath", "shownKey"],
    ["smallPath", "smallKey"],
  ] as const) {
    if (typeof record[field] !== "string" || typeof row[column] !== "string") continue;
    const bytes = await bytesOf(bag, record[field]);
    if (bytes.length < 3 || bytes.readUIntBE(0, 3) !== JPEG)
      throw new Refused(`“${record[field]}” is no JPEG, as copies for pages are.`);
    await put(keys, row[column], bytes, "image/jpeg");
  }
}

export async function textIn(bag: OpenBag, path: string): Promise<string> {
  const bytes = await bytesOf(bag, path);
  if (bytes.length > MOST_RECORD) throw new Refused(`“${path}” is longer than a plate's record can be.`);
  const text = bytes.toString("utf8");
  try {
    const record = JSON.parse(text);
    const fault = plateRecord.safeParse(record).error?.issues[0];
    if (fault)
      throw new Refused(`“${path}” is no record of a plate: ${fault.path.join(".")}: ${fault.message}.`);
    checkAddresses(path, record);
  } catch (error) {
    if (error instanceof SyntaxError) throw new Refused(`“${path}” is not JSON.`);
    throw error;
  }
  return text;
}

/** Figures of a published write-up are drawn into its page as they were stored. */
export function checkFrozen(frozen: string): void {
  const where = "A version in write-up-versions.json";
  let figures: unknown;
  try {
    figures = (JSON.parse(frozen) as { figures?: unknown }).figures ?? [];
  } catch {
    throw new Refused(`${where} keeps figures that are not JSON.`);
  }
  for (const figure of Array.isArray(figures) ? figures : [figures]) {
    const { wide, narrow, path } = (figure ?? {}) as Record<string, unknown>;
    for (const drawing of [wide, narrow]) {
      if (drawing === null || drawing === undefined) continue;
      if (typeof drawing !== "string" || !isHarmlessSvg(drawing)) {
        throw new Refused(`${where} holds a figure that would run or fetch, which no figure of ours does.`);
      }
    }
    if (typeof path !== "string" || !/^\/(?!\/)/.test(path))
      throw new Refused(`${where} leads out of this site.`);
  }
}

/** A form is given to browsers from this site's own address: it is of its kind, and nothing in it may run. */
function checkForm(path: string, form: string, mediaType: string, bytes: Buffer): void {
  const kind = form.split("-")[0];
  if (!Object.hasOwn(MEDIA_TYPES, kind) || typeOf(mediaType) !== typeOf(MEDIA_TYPES[kind])) {
    throw new Refused(`“${path}” is of a kind that no form of a plate is.`);
  }
  const text = () => bytes.toString("utf8");
  const harmless = kind === "svg" ? isHarmlessSvg(text()) : kind === "embed" ? isHarmlessPage(text()) : true;
  if (!harmless) {
    throw new Refused(`“${path}” holds something that would run or fetch, which no figure of ours does.`);
  }
}

function typeOf(mediaType: string): string {
  return mediaType.split(";")[0].trim();
}

function checkAddresses(path: string, value: unknown): void {
  if (typeof value === "string") {
    if (/^\s*(javascript|data|vbscript):/i.test(value))
      throw new Refused(`“${path}” has an address that would run.`);
  } else if (value !== null && typeof value === "object") {
    for (const item of Object.values(value)) checkAddresses(path, item);
  }
}

async function put(keys: KeyMaker, key: string, bytes: Buffer, type: string): Promise<void> {
  await putObject(key, bytes, type);
  keys.stored.add(key);
}

async function bytesOf(bag: OpenBag, path: string): Promise<Buffer> {
  if ((bag.entries.get(path)?.uncompressedSize ?? 0) > MOST_FILE)
    throw new Refused(`“${path}” is larger than any file that is taken.`);
  const chunks: Buffer[] = [];
  for await (const chunk of await bag.read(path)) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

const MEGABYTE = 1024 * 1024;
const MOST_RECORD = 16 * MEGABYTE - 1;
/** The largest original has 64 MB; a plate's CSV of a million points may have more. */
const MOST_FILE = 256 * MEGABYTE;
const JPEG = 0xffd8ff;
