import { and, asc, desc, eq, inArray, isNotNull, lt, or } from "drizzle-orm";
import { db, inTransaction, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { bundleRuns, projects } from "./schema/index.ts";

export type RunRow = typeof bundleRuns.$inferSelect;
export type RunKind = RunRow["kind"];

/** What pages show of a run; `resume` stays in the database. */
const shown = {
  id: bundleRuns.id,
  publicId: bundleRuns.publicId,
  kind: bundleRuns.kind,
  projectId: bundleRuns.projectId,
  userId: bundleRuns.userId,
  state: bundleRuns.state,
  doneParts: bundleRuns.doneParts,
  allParts: bundleRuns.allParts,
  storageKey: bundleRuns.storageKey,
  report: bundleRuns.report,
  createdAt: bundleRuns.createdAt,
  updatedAt: bundleRuns.updatedAt,
  expiresAt: bundleRuns.expiresAt,
};
export type ShownRun = Pick<RunRow, keyof typeof shown>;

export async function findById(id: number, tx: Queryable = db): Promise<RunRow | undefined> {
  return (await tx.select().from(bundleRuns).where(eq(bundleRuns.id, id)).limit(1))[0];
}

export async function findByPublicId(publicId: string, tx: Queryable = db): Promise<ShownRun | undefined> {
  return (await tx.select(shown).from(bundleRuns).where(eq(bundleRuns.publicId, publicId)).limit(1))[0];
}

export async function findExports(projectId: number, tx: Queryable = db): Promise<ShownRun[]> {
  return tx
    .select(shown)
    .from(bundleRuns)
    .where(and(eq(bundleRuns.projectId, projectId), eq(bundleRuns.kind, "export")))
    .orderBy(desc(bundleRuns.createdAt))
    .limit(MOST_SHOWN);
}

/** What a person took in, or asked of their own data, with the project that came of it. */
export async function findByUser(userId: number, kind: "import" | "mine", tx: Queryable = db) {
  return tx
    .select({ ...shown, project: { publicId: projects.publicId, title: projects.title } })
    .from(bundleRuns)
    .leftJoin(projects, eq(projects.id, bundleRuns.projectId))
    .where(and(eq(bundleRuns.userId, userId), eq(bundleRuns.kind, kind)))
    .orderBy(desc(bundleRuns.createdAt))
    .limit(MOST_SHOWN);
}

/** Answers the run as it was written: by the time it is read again, work on it may have begun. */
export async function insert(
  values: Pick<RunRow, "kind" | "projectId" | "userId" | "expiresAt"> & { storageKey?: string },
  tx: Queryable = db,
): Promise<ShownRun> {
  const now = new Date();
  const row = {
    ...{ storageKey: null, ...values },
    ...{ publicId: newPublicId(), state: "waiting" as const, doneParts: 0, allParts: 0, report: null },
    ...{ createdAt: now, updatedAt: now },
  };
  const [{ id }] = await tx.insert(bundleRuns).values(row).$returningId();
  return { id, ...row };
}

/**
 * Takes one run that waits, or whose worker has not been heard of for `leaseMs`. `updatedAt` of the answer is the proof of
 * having it: who writes with another one has lost it.
 */
export function claim(leaseMs: number): Promise<RunRow | undefined> {
  return inTransaction(async (tx) => {
    const now = new Date();
    const [row] = await tx
      .select()
      .from(bundleRuns)
      .where(
        and(
          inArray(bundleRuns.kind, ["export", "import", "mine"]),
          or(
            and(eq(bundleRuns.state, "waiting"), lt(bundleRuns.updatedAt, now)),
            and(eq(bundleRuns.state, "running"), lt(bundleRuns.updatedAt, new Date(now.getTime() - leaseMs))),
          ),
        ),
      )
      .orderBy(asc(bundleRuns.updatedAt))
      .limit(1)
      .for("update", { skipLocked: true });
    if (!row) return undefined;
    await tx.update(bundleRuns).set({ state: "running", updatedAt: now }).where(eq(bundleRuns.id, row.id));
    return { ...row, state: "running" as const, updatedAt: now };
  });
}

/** Writes what a worker has got to; false when the run is no longer its own. */
export async function keep(
  id: number,
  had: Date,
  values: Partial<typeof bundleRuns.$inferInsert>,
  tx: Queryable = db,
): Promise<boolean> {
  const [result] = await tx
    .update(bundleRuns)
    .set(values)
    .where(and(eq(bundleRuns.id, id), eq(bundleRuns.updatedAt, had), eq(bundleRuns.state, "running")));
  return result.affectedRows === 1;
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(bundleRuns).where(eq(bundleRuns.id, id));
}

/** Whether a run still works with an object, or offers it. Keys are `bundles/RUN/…`, those that were given in the run's row. */
export async function isStorageKeyUsed(key: string, tx: Queryable = db): Promise<boolean> {
  const rows = await tx
    .select(shown)
    .from(bundleRuns)
    .where(or(eq(bundleRuns.publicId, key.split("/")[1] ?? ""), eq(bundleRuns.storageKey, key)))
    .limit(1);
  const run = rows.at(0);
  if (!run) return false;
  if (run.state === "waiting" || run.state === "running") return true;
  return run.storageKey === key && run.expiresAt !== null && run.expiresAt > new Date();
}

/** Objects that finished runs of a project still offer. */
export async function findStorageKeys(projectId: number, tx: Queryable = db): Promise<string[]> {
  const rows = await tx
    .select({ key: bundleRuns.storageKey })
    .from(bundleRuns)
    .where(and(eq(bundleRuns.projectId, projectId), isNotNull(bundleRuns.storageKey)))
    .limit(10_000);
  return rows.flatMap(({ key }) => (key === null ? [] : [key]));
}

/** Forgets every run of a person; answers the objects that go with them. */
export async function deleteByUser(userId: number, tx: Queryable): Promise<string[]> {
  const which = and(eq(bundleRuns.userId, userId), inArray(bundleRuns.kind, ["mine", "import"]));
  const rows = await tx.select({ key: bundleRuns.storageKey }).from(bundleRuns).where(which).limit(10_000);
  await tx.delete(bundleRuns).where(which);
  return rows.flatMap(({ key }) => (key === null ? [] : [key]));
}

/** Forgets runs that ended long ago, a day after what they offered went. */
export async function deleteExpired(now = new Date(), tx: Queryable = db) {
  await tx
    .delete(bundleRuns)
    .where(
      and(
        inArray(bundleRuns.kind, ["export", "import", "mine"]),
        inArray(bundleRuns.state, ["done", "failed"]),
        lt(bundleRuns.expiresAt, new Date(now.getTime() - DAY_MS)),
      ),
    );
}

const MOST_SHOWN = 20;
const DAY_MS = 24 * 60 * 60 * 1000;
