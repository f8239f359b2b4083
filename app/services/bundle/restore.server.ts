import { KINDS, type KindName } from "~/db/bundle-kinds.server";
import * as bundleRows from "~/db/bundle-rows.server";
import { inTransaction } from "~/db/client.server";
import { encodePoints } from "../points.server.ts";
import type { Lease } from "./lease.server.ts";
import { linesOf } from "./lines.ts";
import type { OpenBag } from "./open-zip.server.ts";
import { pointsFromCsv } from "./points-csv.ts";
import { readRecords } from "./read-records.server.ts";
import { RECORDS, type Rec } from "./records.ts";
import { Refused } from "./refused.ts";
import { laterColumns, laterOf, type Places, rowOf } from "./restore-rows.server.ts";
import { checkFrozen, KeyMaker, storeFiles, textIn } from "./store-files.server.ts";

/**
 * Writes everything of a checked bundle into a project that nobody can see yet. Rows come before their objects: whoever
 * clears a half project finds by its rows what to remove from the store.
 */
export async function restoreRows(
  bag: OpenBag,
  lease: Lease,
  places: Places,
  projectPublicId: string,
  told: (records: number) => Promise<void>,
): Promise<void> {
  const keys = new KeyMaker(projectPublicId, places.ids);
  for (const kind of KINDS) {
    if (kind.name === "project") continue;
    places.rows.set(kind.name, new Map());
    for await (const batch of batchesOf(readRecords(bag, kind.name, RECORDS[kind.name]))) {
      const rows: bundleRows.Row[] = [];
      for (const record of batch) {
        const row = rowOf(kind, record, places);
        Object.assign(row, keys.columnsOf(kind.name, record));
        if (kind.name === "plates") row.record = await textIn(bag, String(record.recordPath));
        if (kind.name === "write-up-versions") checkFrozen(String(record.frozen));
        rows.push(row);
      }
      const made = await inTransaction((tx) => bundleRows.insertRows(kind, rows, tx));
      for (const record of batch) {
        const place = made.get(places.ids.of(kind.name, String(record.id)));
        if (place !== undefined) places.rows.get(kind.name)?.set(String(record.id), place);
      }
      for (const [i, record] of batch.entries()) await storeFiles(bag, kind.name, record, rows[i], keys);
      if (kind.name === "readings") await restorePoints(bag, batch, places);
      await told(batch.length);
    }
  }
  for (const kind of KINDS.filter((one) => laterColumns(one).length > 0)) {
    for await (const batch of batchesOf(readRecords(bag, kind.name, RECORDS[kind.name]))) {
      await inTransaction(async (tx) => {
        for (const record of batch) {
          const values = laterOf(kind, record, places);
          const place = places.rows.get(kind.name)?.get(String(record.id));
          if (values && place !== undefined) await bundleRows.updateRow(kind, place, values, tx);
        }
      });
    }
  }
  for await (const sweep of readRecords(bag, "sweeps", RECORDS.sweeps)) {
    if (typeof sweep.previewPath !== "string") continue;
    const parts = await partsOf(bag, sweep.previewPath, Number(sweep.referenceOhm), LONGEST_PREVIEW);
    await bundleRows.updatePreview(rowIdOf(places, "sweeps", sweep.id), parts[0]);
    await lease.tell({});
  }
}

async function restorePoints(bag: OpenBag, readings: Rec[], places: Places): Promise<void> {
  for (const reading of readings) {
    if (typeof reading.pointsPath !== "string") continue;
    const parts = await partsOf(bag, reading.pointsPath, Number(reading.referenceOhm));
    const id = rowIdOf(places, "readings", reading.id);
    await inTransaction((tx) => bundleRows.insertPoints(id, parts, tx));
  }
}

async function partsOf(bag: OpenBag, path: string, referenceOhm: number, most?: number): Promise<Buffer[]> {
  try {
    const sweep = await pointsFromCsv(linesOf(await bag.read(path)), referenceOhm);
    if (most !== undefined && sweep.frequencyHz.length > most)
      throw new Error(`there are more than ${most} points`);
    return encodePoints(sweep);
  } catch (error) {
    throw new Refused(`“${path}” can't be read as points: ${(error as Error).message}.`);
  }
}

function rowIdOf(places: Places, kind: KindName, id: unknown): number {
  const found = places.rows.get(kind)?.get(String(id));
  if (found === undefined) throw new Error(`The row of ${kind} ${id} was not written.`);
  return found;
}

async function* batchesOf(records: AsyncIterable<Rec>): AsyncGenerator<Rec[]> {
  let batch: Rec[] = [];
  for await (const record of records) {
    batch.push(record);
    if (batch.length < BATCH) continue;
    yield batch;
    batch = [];
  }
  if (batch.length > 0) yield batch;
}

const BATCH = 50;
/** Previews hold 1600 points and a few for dips. */
const LONGEST_PREVIEW = 10_000;
