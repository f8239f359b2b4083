import { pool } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { findOrCreateByIdentity } from "~/services/people.server";
import { deleteProject } from "~/services/projects.server";
import demoPeople from "../demo-people.json";
import { benchStory } from "./bench-story.ts";
import { CAST, type Cast, type Who } from "./cast.ts";
import { dipoleStory } from "./dipole-story.ts";
import { play } from "./play.ts";
import { reedBankStory } from "./reed-bank-story.ts";

/**
 * Builds the demo once: invented people, three projects, their sweeps and what was said about them. It says in the
 * database that it is done; what a killed build left behind is removed and built anew. A demo project that somebody
 * deleted later stays deleted.
 */
export async function buildDemo(): Promise<"built" | "there already"> {
  if (await jobs.findFact(FACT)) return "there already";
  for (const id of await projects.findIdsOfDemo()) await deleteProject(id);
  const cast = await findCast();
  const benchIds = new Map<string, number>();
  await play(benchStory(), cast, benchIds);
  await Promise.all([dipoleStory(), reedBankStory()].map((story) => play(story, cast, benchIds)));
  await jobs.setFact(FACT, { version: VERSION });
  return "built";
}

/** People come in by the stand-in for GitHub where there is one; elsewhere nobody can sign in as one of them. */
async function findCast(): Promise<Cast> {
  const provider = env.LOCAL_GITHUB ? "github" : "demo";
  const cast: Partial<Cast> = {};
  for (const { id, login, name, email } of demoPeople) {
    const identity = { provider, subject: String(id), login, name, email };
    if ((CAST as readonly string[]).includes(login))
      cast[login as Who] = await findOrCreateByIdentity(identity);
    else if (env.LOCAL_GITHUB && login === KEEPER) {
      await people.update((await findOrCreateByIdentity(identity)).id, { administrator: true });
    }
  }
  const missing = CAST.filter((who) => !cast[who]);
  if (missing.length > 0) throw new Error(`Nobody plays ${missing.join(", ")} in the demo.`);
  return cast as Cast;
}

const FACT = "demo";
const VERSION = 1;
const KEEPER = "site-keeper";

if (process.argv[1]?.endsWith("scripts/demo/build.ts")) {
  try {
    console.log(`The demo is ${await buildDemo()}.`);
  } finally {
    await pool.end();
  }
}
