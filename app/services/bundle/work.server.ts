import { inSnapshot } from "~/db/bundle-rows.server";
import * as runs from "~/db/bundle-runs.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { log } from "../log.server.ts";
import { deleteObject } from "../storage.server.ts";
import { LEASE_MS, Lease, LeaseLost } from "./lease.server.ts";
import { dropMade, type Making, makeBundle } from "./make.server.ts";
import { planMine } from "./mine.server.ts";
import { planProject } from "./plan.server.ts";
import type { PlanLine } from "./plan.ts";
import { Refused } from "./refused.ts";
import { clearHalf, takeInBundle } from "./take-in.server.ts";

/**
 * The work on bundles, beside other background work because a run may last minutes. A run is claimed by one process and
 * held for as long as it says that it is alive; one that died is gone on with by whoever looks next.
 */
export function startBundles(everyMs = 2000): () => Promise<void> {
  let stopped = false;
  let lastSweepMs = 0;
  let running: Promise<unknown> = Promise.resolve();
  const tick = () => {
    running = workOnBundles(() => stopped)
      .then(async () => {
        if (Date.now() - lastSweepMs < SWEEP_EVERY_MS) return;
        lastSweepMs = Date.now();
        await runs.deleteExpired();
      })
      .catch((error) => log.warn({ err: error }, "bundles could not be looked for; it is tried again"))
      .finally(() => {
        if (!stopped) timer = setTimeout(tick, everyMs);
      });
  };
  let timer = setTimeout(tick, everyMs);
  return async () => {
    stopped = true;
    clearTimeout(timer);
    // A run under way may last; it is given up and gone on with by another process.
    await Promise.race([running, new Promise((resolve) => setTimeout(resolve, PATIENCE_MS))]);
  };
}

/** Works on every run that waits or was left by a process that died; answers how many ended. */
export async function workOnBundles(isStopped = () => false, leaseMs = LEASE_MS): Promise<number> {
  for (let done = 0; ; done++) {
    const run = isStopped() ? undefined : await runs.claim(leaseMs);
    if (!run) return done;
    await work(new Lease(run));
  }
}

async function work(lease: Lease): Promise<void> {
  const { run } = lease;
  try {
    if (run.kind === "import") await takeInBundle(lease);
    else await makeBundle(lease, await makingOf(run));
  } catch (error) {
    if (error instanceof LeaseLost) {
      const left = await runs.findById(run.id);
      // Gone with its project or its person: nobody goes on with it. Else another process has it.
      if (!left) await dropRun(run);
      return;
    }
    await afterFault(lease, error).catch((again) => {
      if (!(again instanceof LeaseLost))
        log.warn({ err: again, run: run.publicId }, "a fault could not be noted");
    });
  }
}

/** Refused: that is the answer. Else tried again: from where it was, then from the beginning, then no more. */
async function afterFault(lease: Lease, error: unknown): Promise<void> {
  const { run } = lease;
  if (error instanceof Refused) {
    await dropRun(run);
    await lease.keep({ state: "failed", report: { faults: error.faults }, resume: null, storageKey: null });
    return;
  }
  log.warn({ err: error, run: run.publicId, kind: run.kind }, "work on a bundle failed");
  const attempts = ((run.report as { attempts?: number } | null)?.attempts ?? 0) + 1;
  if (attempts >= MOST_ATTEMPTS) {
    await dropRun((await runs.findById(run.id)) ?? run);
    await lease.keep({ state: "failed", report: { faults: [FAILED] }, resume: null, storageKey: null });
    return;
  }
  const updatedAt = new Date(Date.now() + 1000 * 2 ** attempts);
  const name = (error as { name?: string }).name ?? "";
  const anew = run.kind !== "import" && (attempts > 2 || GONE.has(name));
  if (anew) await dropMade(run.publicId, (await runs.findById(run.id))?.resume ?? null);
  await lease.keep({
    state: "waiting",
    report: { attempts, fault: String(error).slice(0, 500) },
    updatedAt,
    ...(anew && { resume: null }),
  });
}

/** Takes away all that a run has outside its row. */
async function dropRun(run: runs.RunRow): Promise<void> {
  if (run.kind === "import") {
    await clearHalf(run);
    if (run.storageKey) await deleteObject(run.storageKey);
  } else await dropMade(run.publicId, run.resume);
}

async function makingOf(run: runs.RunRow): Promise<Making> {
  if (run.kind === "mine") {
    const person = await people.findById(run.userId ?? 0);
    if (!person) throw new Error("The person is not there any more.");
    const name = `swale-my-data-${dayOf(run.createdAt)}`;
    const about = { "Source-Organization": env.BASE_URL, "External-Description": "All data of one person" };
    return { name, about, plan: () => fromSnapshot((tx) => planMine(person.id, tx)) };
  }
  const found = await projects.findWithRoleById(run.projectId ?? 0, null);
  if (!found) throw new Error("The project is not there any more.");
  const { project } = found;
  return {
    name: `swale-${slug(project.title)}-${dayOf(run.createdAt)}`,
    about: {
      "Source-Organization": env.BASE_URL,
      "External-Identifier": `${env.BASE_URL}/projects/${project.publicId}`,
      "External-Description": project.title,
    },
    plan: () => fromSnapshot((tx) => planProject(project.id, run.createdAt, tx)),
  };
}

/** The lines of a plan, all read within one snapshot: the transaction ends with the last line. */
async function* fromSnapshot(
  plan: (tx: Parameters<Parameters<typeof inSnapshot>[0]>[0]) => AsyncGenerator<PlanLine>,
): AsyncGenerator<PlanLine> {
  const lines: PlanLine[] = [];
  let wake = () => {};
  let room = () => {};
  let ended = false;
  let given = false;
  const reading = inSnapshot(async (tx) => {
    for await (const line of plan(tx)) {
      if (given) return;
      lines.push(line);
      wake();
      if (lines.length > AHEAD) await new Promise<void>((resolve) => (room = resolve));
    }
  }).finally(() => {
    ended = true;
    wake();
  });
  reading.catch(() => undefined);
  try {
    for (;;) {
      const line = lines.shift();
      if (line) {
        room();
        yield line;
      } else if (ended) break;
      else await new Promise<void>((resolve) => (wake = resolve));
    }
    await reading;
  } finally {
    given = true;
    room();
  }
}

function slug(title: string): string {
  const plain = title
    .normalize("NFKD")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-+|-+$/g, "");
  return plain.slice(0, 40).replace(/-$/, "") || "project";
}

function dayOf(at: Date): string {
  return at.toISOString().slice(0, 10);
}

const GONE = new Set(["NoSuchKey", "NotFound", "NoSuchUpload"]);
const AHEAD = 64;
const MOST_ATTEMPTS = 5;
const PATIENCE_MS = 5_000;
const SWEEP_EVERY_MS = 10 * 60 * 1000;
const FAILED =
  "Something failed here again and again. Nothing was changed. Try it once more; if it fails again, tell whoever runs this Swale.";
