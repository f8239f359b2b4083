import { getTableColumns } from "drizzle-orm";
import { type BundleKind, columnsOf, KINDS, type KindName } from "~/db/bundle-kinds.server";
import * as bundleRows from "~/db/bundle-rows.server";
import { db } from "~/db/client.server";
import { findPoints } from "~/db/sweeps.server";
import { nameOfPerson } from "~/services/bundle/placeholders";
import { getObject, sha256Of } from "~/services/storage.server";

/** One field of a kind of rows, compared over all of them. */
export interface Compared {
  field: string;
  rows: number;
  different: number;
  /** Of those, what names a row of another project, such as somebody's own bench: that stays there. */
  leftOut: number;
  /** Of the first that differs. */
  example?: string;
}

/**
 * Compares two projects field by field. Rows are paired in the order in which they came about; what names a row is
 * compared by that row's place in its order, so that ids may differ. Bytes are compared by their sums.
 */
export async function compareProjects(one: number, other: number): Promise<Compared[]> {
  const results: Compared[] = [];
  const sides = [await sideOf(one), await sideOf(other)];
  for (const kind of KINDS) {
    const [left, right] = [await rowsOf(kind, one), await rowsOf(kind, other)];
    results.push(compared(`${kind.name}: rows`, [String(left.length)], [String(right.length)]));
    if (left.length !== right.length || left.length === 0) continue;
    const columns = [...columnsOf(kind).map(([column]) => column), ...kept(kind)];
    for (const column of columns) {
      const values = await Promise.all([
        Promise.all(left.map((row) => valueIn(kind, column, row, sides[0]))),
        Promise.all(right.map((row) => valueIn(kind, column, row, sides[1]))),
      ]);
      results.push(compared(`${kind.name}.${column}`, values[0], values[1]));
    }
    if (kind.name === "readings") {
      const sums = async (rows: bundleRows.Row[]) => {
        const all: string[] = [];
        for (const row of rows) all.push(sha256Of(Buffer.concat(await findPoints(Number(row.id)))));
        return all;
      };
      results.push(compared("readings: points as stored", await sums(left), await sums(right)));
    }
    if (kind.name === "sweeps") {
      const sums = async (rows: bundleRows.Row[]) => {
        const found = await bundleRows.findPreviews(
          rows.map((row) => Number(row.id)),
          db,
        );
        const byId = new Map(found.map(({ id, preview }) => [id, preview]));
        return rows.map((row) => {
          const preview = byId.get(Number(row.id));
          return preview ? sha256Of(preview) : "none";
        });
      };
      results.push(compared("sweeps: curves as stored", await sums(left), await sums(right)));
    }
  }
  return results;
}

/** What must differ, or may: a project begins private, and its id and its rows' ids are those of where it is. */
export const MAY_DIFFER = new Set(["project.visibility"]);

interface Side {
  /** Public id → kind and place in its order. */
  names: Map<string, string>;
  rows: Map<KindName, Map<number, number>>;
  people: Map<number, string>;
}

async function sideOf(projectId: number): Promise<Side> {
  const side: Side = { names: new Map(), rows: new Map(), people: new Map() };
  const persons = new Set<number>();
  for (const kind of KINDS) {
    const places = new Map<number, number>();
    for (const [place, row] of (await rowsOf(kind, projectId)).entries()) {
      if ("id" in row) places.set(Number(row.id), place);
      if (row.publicId) side.names.set(String(row.publicId), `${kind.name}#${place}`);
      for (const [column, names] of Object.entries(kind.refs)) {
        if (names === "people" && row[column] !== null) persons.add(Number(row[column]));
      }
    }
    side.rows.set(kind.name, places);
  }
  for (const person of await bundleRows.findPersons([...persons], db)) {
    side.people.set(person.id, nameOfPerson(person));
    side.names.set(person.publicId, `person ${nameOfPerson(person)}`);
  }
  return side;
}

async function valueIn(kind: BundleKind, column: string, row: bundleRows.Row, side: Side): Promise<string> {
  const value = row[column];
  if (value === null || value === undefined) return "null";
  if (/Key$/.test(column)) return sha256Of(await getObject(String(value)));
  const names = kind.refs[column];
  if (names === "people") return side.people.get(Number(value)) ?? "nobody";
  if (names) return `${names}#${side.rows.get(names)?.get(Number(value)) ?? "elsewhere"}`;
  const text =
    value instanceof Date ? value.toISOString() : typeof value === "string" ? value : JSON.stringify(value);
  // What was frozen keeps the ids of where it was frozen.
  if (FROZEN.has(`${kind.name}.${column}`)) return text;
  return text.replace(/\b[0-9a-z]{10}\b/g, (word) => side.names.get(word) ?? word);
}

/** Places in the store, and the text of a plate's record: compared, though no column of the records. */
function kept(kind: BundleKind): string[] {
  const columns = Object.keys(getTableColumns(kind.table));
  return kind.left.filter(
    (column) =>
      columns.includes(column) && (/Key$/.test(column) || column === "record") && column !== "clientKey",
  );
}

async function rowsOf(kind: BundleKind, projectId: number): Promise<bundleRows.Row[]> {
  const all: bundleRows.Row[] = [];
  for await (const page of bundleRows.readAll(kind, projectId, db)) all.push(...page);
  return all;
}

const FROZEN = new Set([
  "mentions.source",
  "mentions.target",
  "plates.record",
  "plate-sources.sweep",
  "plate-sources.recipe",
  "write-up-versions.frozen",
]);

function compared(field: string, left: string[], right: string[]): Compared {
  const places = left.flatMap((value, i) => (value === right[i] ? [] : [i]));
  const at = places[0];
  return {
    field,
    rows: left.length,
    different: places.length,
    leftOut: left.filter((value, i) => value !== right[i] && value.endsWith("#elsewhere")).length,
    ...(at !== undefined && { example: `${left[at]?.slice(0, 120)} ≠ ${right[at]?.slice(0, 120)}` }),
  };
}
