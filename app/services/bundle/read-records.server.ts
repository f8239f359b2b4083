import type { z } from "zod";
import { KINDS, type KindName } from "~/db/bundle-kinds.server";
import type { Checked } from "./check-bag.server.ts";
import { LineTooLong, linesOf } from "./lines.ts";
import type { OpenBag } from "./open-zip.server.ts";
import { PATH_FIELDS, PEOPLE, type PersonRecord, RECORDS, type Rec } from "./records.ts";
import { Refused } from "./refused.ts";

/** The ids of each kind's records, as the bundle has them. */
export type BundleIds = Map<KindName, Set<string>>;

export interface Found {
  ids: BundleIds;
  people: PersonRecord[];
  project: Rec;
  records: number;
}

/**
 * Looks at every record: its shape, that what it names is in the bundle, that its bytes are there and are what it says. Holds no
 * more of them than their ids. Throws `Refused`.
 */
export async function checkRecords(bag: OpenBag, checked: Checked): Promise<Found> {
  const people = await collect(readRecords<PersonRecord>(bag, "people", PEOPLE));
  const ids: BundleIds = new Map();
  let project: Rec | undefined;
  let records = 0;
  for (const kind of KINDS) {
    const own = new Set<string>();
    for await (const record of readRecords(bag, kind.name, RECORDS[kind.name])) {
      records++;
      if (kind.name === "project") project = record;
      if ("id" in record) {
        if (own.has(String(record.id)))
          throw new Refused(`Two records of ${kind.name}.json have the id ${record.id}.`);
        own.add(String(record.id));
      }
    }
    ids.set(kind.name, own);
  }
  if (!project || ids.get("project")?.size !== 1)
    throw new Refused("It does not say which one project it is of.");
  const named = new Set(people.map((person) => person.id));
  for (const kind of KINDS) {
    for await (const record of readRecords(bag, kind.name, RECORDS[kind.name])) {
      checkRefs(kind.name, record, ids, named);
      checkBytes(kind.name, record, checked);
    }
  }
  return { ids, people, project, records };
}

/** The records of one file, each as its shape gives it. The first bundles had no mentions. */
export async function* readRecords<T extends Rec = Rec>(
  bag: OpenBag,
  name: KindName | "people",
  shape: z.ZodType,
): AsyncGenerator<T> {
  const path = `data/records/${name}.json`;
  if (!bag.entries.has(path)) {
    if (name === "mentions") return;
    throw new Refused(`It has no ${path}.`);
  }
  let line = 0;
  let ended = false;
  try {
    for await (const text of linesOf(await bag.read(path), LONGEST_RECORD)) {
      line++;
      if (line === 1) {
        if (text !== `{"kind":"${name}","format":1,"records":[`)
          throw new Refused(`${path} does not begin as it should.`);
        continue;
      }
      if (text === "]}") {
        ended = true;
        continue;
      }
      if (ended || text === "") {
        if (ended) throw new Refused(`${path} goes on after its end.`);
        continue;
      }
      const raw = JSON.parse(text.replace(/,$/, ""));
      const parsed = shape.safeParse(raw);
      if (!parsed.success) {
        const { path: where, message } = parsed.error.issues[0];
        throw new Refused(
          `Line ${line} of ${path} is not as it should be: ${where.join(".") || "the record"}: ${message}.`,
        );
      }
      yield asGiven(raw, parsed.data as T);
    }
  } catch (error) {
    if (error instanceof SyntaxError) throw new Refused(`Line ${line} of ${path} is not JSON.`);
    if (error instanceof LineTooLong) throw new Refused(`${path} can't be read: ${error.message}.`);
    throw error;
  }
  if (!ended) throw new Refused(`${path} is cut short.`);
}

/** What was checked, as it was written: only times became dates. Checking would put what is inside in another order. */
function asGiven<T extends Rec>(raw: Rec, parsed: T): T {
  const entries = Object.entries(parsed).map(([key, value]) => [
    key,
    value instanceof Date ? value : raw[key],
  ]);
  return Object.fromEntries(entries) as T;
}

function checkRefs(name: KindName, record: Rec, ids: BundleIds, people: Set<string>): void {
  const kind = KINDS.find((one) => one.name === name);
  for (const [column, names] of Object.entries(kind?.refs ?? {})) {
    const value = record[column.replace(/Id$/, "")];
    if (value === null || value === undefined) continue;
    const known = names === "people" ? people : ids.get(names);
    if (!known?.has(String(value))) {
      throw new Refused(`A record of ${name}.json names ${names} ${value}, which is not in the bundle.`);
    }
  }
}

function checkBytes(name: KindName, record: Rec, checked: Checked): void {
  for (const field of PATH_FIELDS) {
    const path = record[field];
    if (typeof path !== "string") continue;
    const found = checked.get(path);
    if (!found)
      throw new Refused(`A record of ${name}.json says that its bytes are at “${path}”, where nothing is.`);
    const sum = field === "recordPath" ? record.recordSha256 : field === "path" ? record.sha256 : undefined;
    if (sum !== undefined && sum !== found.sha256) {
      throw new Refused(`“${path}” is not the file that its record in ${name}.json speaks of.`);
    }
  }
}

async function collect<T>(items: AsyncIterable<T>): Promise<T[]> {
  const all: T[] = [];
  for await (const item of items) {
    all.push(item);
    if (all.length > MOST_PEOPLE) throw new Refused("It names more people than a project has.");
  }
  return all;
}

const LONGEST_RECORD = 32 * 1024 * 1024;
const MOST_PEOPLE = 100_000;
