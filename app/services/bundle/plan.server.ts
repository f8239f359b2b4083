import { type BundleKind, columnsOf, fieldOf, KINDS, type KindName } from "~/db/bundle-kinds.server";
import * as rows from "~/db/bundle-rows.server";
import type { Queryable } from "~/db/client.server";
import { env } from "~/env.server";
import type { StoredDip } from "~/measurement/dips/complete";
import { annotationOf } from "./annotations.ts";
import { contentsOf } from "./contents.ts";
import { planCurves, previewPath } from "./curves.server.ts";
import { indexPage, type Overview, type ShownNumbers } from "./pages.ts";
import { nameOfPerson } from "./placeholders.ts";
import { type PlanLine, textEntry } from "./plan.ts";
import { README, schemaText } from "./readme.ts";
import type { Rec } from "./records.ts";
import { type Subject, subjectOfNote, threadLines } from "./thread-plan.server.ts";

/** What the index names of each kind; the rest is not held. */
const SHOWN = new Set<KindName>([
  "project",
  "bands",
  "originals",
  "sweeps",
  "readings",
  "dips",
  "trails",
  "steps",
  "benches",
  "plates",
  "write-ups",
  "photographs",
]);

/** Everything of a project as it is at this moment; `tx` is a snapshot. */
export async function* planProject(projectId: number, at: Date, tx: Queryable): AsyncGenerator<PlanLine> {
  const context: Context = {
    projectId,
    tx,
    ids: await rows.readPublicIds(projectId, tx),
    people: new Map(),
    shown: new Map(),
    subjects: new Map(),
    seen: new Set(),
  };
  const members = await rows.findMembers(projectId, tx);
  for (const { userId, role } of members) context.people.set(userId, { publicId: "", name: "", role });
  await learnPeople(context);
  for (const kind of KINDS) yield* planKind(kind, context);
  const figures = new Set<string>();
  yield* planCurves(context, figures);
  yield* planWriteUps(context);
  const threads: Overview["threads"] = [];
  yield* threadLines(context.subjects, tx, threads);
  const people = [...context.people.values()].map(({ publicId, name, role }) => ({
    id: publicId,
    name,
    role,
  }));
  yield* textEntry("data/records/people.json", recordsText("people", people));
  yield* textEntry("data/records/people.schema.json", schemaText("people"));
  yield* textEntry("data/README.md", README);
  const overview: Overview = {
    project: context.shown.get("project")?.[0] ?? {},
    people,
    records: context.shown,
    threads,
    figures,
    madeAt: at.toISOString(),
    origin: env.BASE_URL,
  };
  yield* textEntry("data/index.html", indexPage(overview));
}

interface Context {
  projectId: number;
  tx: Queryable;
  ids: Map<KindName, rows.PublicIds>;
  people: Map<number, { publicId: string; name: string; role: string | null }>;
  shown: Map<string, Rec[]>;
  subjects: Map<string, Subject>;
  seen: Set<string>;
}

/** One file of records, then the bytes that belong to them. */
async function* planKind(kind: BundleKind, context: Context): AsyncGenerator<PlanLine> {
  const contents: PlanLine[] = [];
  const annotations: string[] = [];
  yield { path: `data/records/${kind.name}.json`, from: "text" };
  yield { text: headOf(kind.name) };
  let first = true;
  for await (const page of rows.readAll(kind, context.projectId, context.tx)) {
    await learnPeople(context, kind, page);
    const heads =
      kind.name === "readings"
        ? await rows.findPointHeads(
            page.map((row) => Number(row.id)),
            context.tx,
          )
        : new Map<number, Buffer>();
    const lines: string[] = [];
    for (const row of page) {
      const record = recordOf(kind, row, context);
      const own = contentsOf(kind.name, row, record, heads.get(Number(row.id)));
      Object.assign(record, own.fields);
      if (kind.name === "sweeps")
        record.previewPath = row.analysisId === null ? null : previewPath(record.id);
      // A removed note keeps its text for as long as that can be undone; nobody reads it.
      if (kind.name === "notes" && record.removedAt !== null) record.body = "";
      const line = JSON.stringify(record);
      lines.push(line);
      contents.push(...own.lines.filter((one) => isNew(one, context.seen)));
      if (SHOWN.has(kind.name)) push(context.shown, kind.name, slim(JSON.parse(line)));
      if (kind.name === "notes") {
        const author = context.people.get(Number(row.authorId))?.name ?? null;
        annotations.push(JSON.stringify(annotationOf(JSON.parse(line), author)));
        subjectOfNote(record, Number(row.id), context.shown, context.subjects);
      }
    }
    yield { text: (first ? "" : ",\n") + lines.join(",\n") };
    first = false;
  }
  yield { text: TAIL };
  yield* textEntry(`data/records/${kind.name}.schema.json`, schemaText(kind.name));
  yield* contents;
  if (kind.name === "notes") {
    yield* textEntry("data/notes/annotations.jsonld", `[\n${annotations.join(",\n")}\n]\n`);
  }
}

function recordOf(kind: BundleKind, row: rows.Row, { ids, people }: Context): Rec {
  const record: Rec = {};
  for (const [column] of columnsOf(kind)) {
    const value = row[column];
    const names = kind.refs[column];
    if (names === undefined) record[fieldOf(kind, column)] = value;
    else if (value === null) record[fieldOf(kind, column)] = null;
    else if (names === "people") record[fieldOf(kind, column)] = people.get(Number(value))?.publicId || null;
    // What stands in another project, such as a person's own bench, stays there.
    else record[fieldOf(kind, column)] = ids.get(names)?.get(Number(value)) ?? null;
  }
  return record;
}

/** Names and ids of whoever these rows name, or of whom only the row id is known yet. */
async function learnPeople(context: Context, kind?: BundleKind, page: rows.Row[] = []): Promise<void> {
  const columns = Object.entries(kind?.refs ?? {}).filter(([, names]) => names === "people");
  for (const row of page) {
    for (const [column] of columns) {
      const id = row[column];
      if (id !== null && !context.people.has(Number(id))) {
        context.people.set(Number(id), { publicId: "", name: "", role: null });
      }
    }
  }
  const unknown = [...context.people].filter(([, person]) => person.publicId === "").map(([id]) => id);
  for (const found of await rows.findPersons(unknown, context.tx)) {
    const person = context.people.get(found.id);
    if (person) Object.assign(person, { publicId: found.publicId, name: nameOfPerson(found) });
  }
}

async function* planWriteUps(context: Context): AsyncGenerator<PlanLine> {
  const kind = KINDS.find(({ name }) => name === "write-ups") as BundleKind;
  for await (const page of rows.readAll(kind, context.projectId, context.tx)) {
    for (const row of page) {
      yield* textEntry(`data/write-ups/${row.publicId}.md`, `# ${row.title}\n\n${row.body}\n`);
    }
  }
}

function push<T>(lists: Map<string, T[]>, key: string, value: T): void {
  const list = lists.get(key);
  if (list) list.push(value);
  else lists.set(key, [value]);
}

/** An object that several rows share goes in once. */
function isNew(line: PlanLine, seen: Set<string>): boolean {
  if (!("path" in line) || line.from !== "object") return true;
  if (seen.has(line.path)) return false;
  seen.add(line.path);
  return true;
}

/** Without what is long and not shown by the index. */
function slim(record: Rec): Rec {
  const { numbers, reading, given: _g, quantities: _q, expected: _e, ...rest } = record;
  return {
    ...rest,
    ...(typeof reading === "string" && { reading }),
    ...(numbers !== undefined && { numbers: shownOf(numbers as StoredDip) }),
  };
}

/** Of a dip's numbers, those that the index shows. */
function shownOf(numbers: StoredDip): ShownNumbers {
  const { frequencyHz, frequencyUncertaintyHz, minimumSwr, minimumSwrLow, minimumSwrHigh } = numbers;
  return { frequencyHz, frequencyUncertaintyHz, minimumSwr, minimumSwrLow, minimumSwrHigh };
}

function recordsText(kind: string, records: Rec[]): string {
  return headOf(kind) + records.map((record) => JSON.stringify(record)).join(",\n") + TAIL;
}

function headOf(kind: string): string {
  return `{"kind":"${kind}","format":1,"records":[\n`;
}

const TAIL = "\n]}\n";
