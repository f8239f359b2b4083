import { data } from "react-router";
import type { Person, ProjectAccess } from "~/auth/require.server";
import * as dips from "~/db/dips.server";
import * as trails from "~/db/trails.server";
import { notFound } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { type Joined, joinDip, joinTrails, partDips, takeBack } from "~/services/trail-corrections.server";
import { changeTrailVerdict, nameTrail } from "~/services/trail-verdicts.server";
import { chosenEvidence, evidenceForTrail } from "~/services/verdict-evidence.server";
import type { VerdictChange } from "~/services/verdicts.server";
import type { TrailForm } from "./trails.schema.ts";

/** Does what a form of the trail page asks, or says why not: beside the form where the page `stays`, else on it anew. */
export async function correctTrail(
  access: ProjectAccess,
  person: Person,
  publicId: string,
  form: TrailForm,
  stays: boolean,
) {
  const { project } = access;
  const found = await trails.findByPublicId(publicId);
  if (!found || found.trail.projectId !== project.id) throw notFound("trail");
  const { trail } = found;
  const task = { projectId: project.id, by: person };
  const pageOf = (id: string) => `/projects/${project.publicId}/trails/${id}`;
  const notDone = (problem: string) =>
    stays
      ? data({ intent: form.intent, errors: [problem] }, 409)
      : redirectWithMessage(pageOf(publicId), problem);
  const answer = async (joined: Joined, done: string) => {
    if (joined.kind === "done") return redirectWithMessage(pageOf(joined.trail.publicId), done);
    return notDone(await problemOf(joined));
  };
  switch (form.intent) {
    case "name": {
      if (!(await nameTrail({ trail, by: person, name: form.name }))) throw notFound("trail");
      return redirectWithMessage(
        pageOf(publicId),
        form.name ? "The trail has its name." : "The name was taken away.",
      );
    }
    case "propose":
    case "settle":
    case "reopen": {
      const { evidence: keys = [], ...said } = form;
      const evidence = keys.length > 0 ? chosenEvidence(keys, await evidenceForTrail(trail)) : [];
      const change = await changeTrailVerdict({ trail, by: person, ...said, evidence });
      if (change === "missing") throw notFound("trail");
      if (change === "done") return redirectWithMessage(pageOf(publicId), SAID[form.intent]);
      return notDone(VERDICT_PROBLEMS[change]);
    }
    case "part":
    case "take-back": {
      const [dipId, otherId] = [await rowIdOf(form.one, project.id), await rowIdOf(form.other, project.id)];
      const pair = { ...task, dipId, otherId };
      if (form.intent === "part")
        return answer(await partDips(pair), "The trail was parted. It can be taken back below.");
      return answer(await takeBack(pair), "The correction was taken back; the pairing decides again.");
    }
    case "join": {
      const other = await trails.findByPublicId(form.other);
      if (other?.trail.projectId !== project.id) throw notFound("trail");
      const joined = await joinTrails({ ...task, trailId: trail.id, otherId: other.trail.id });
      return answer(joined, "The two are one trail. It can be taken back below.");
    }
    case "join-dip": {
      const dipId = await rowIdOf(form.dip, project.id);
      const to = form.trail ? (await trails.findByPublicId(form.trail))?.trail : trail;
      if (to?.projectId !== project.id) throw notFound("trail");
      const joined = await joinDip({ ...task, dipId, trailId: to.id });
      return answer(joined, "The dip is on this trail now. It can be taken back below.");
    }
    default:
      return form satisfies never;
  }
}

async function rowIdOf(publicId: string, projectId: number): Promise<number> {
  const found = await dips.findByPublicId(publicId);
  if (!found || found.dip.projectId !== projectId) throw notFound("dip");
  return found.dip.id;
}

async function problemOf(joined: Exclude<Joined, { kind: "done" }>): Promise<string> {
  switch (joined.kind) {
    case "already":
      return "These are on one trail already. Nothing was changed.";
    case "missing":
      return "One of the two is not there any more: somebody changed the sweeps or the trails meanwhile. Nothing was changed; look at the trail again.";
    case "both-in": {
      const title = await trails.findSweepTitle(joined.sweepId);
      return `Both have a dip in “${title}”, and one trail has at most one dip of a sweep. Nothing was changed; part the trail there first.`;
    }
    default:
      return joined satisfies never;
  }
}

const SAID = {
  propose: "The explanation is proposed.",
  settle: "The trail is settled.",
  reopen: "The trail is open again.",
};

const VERDICT_PROBLEMS: Record<Exclude<VerdictChange, "done" | "missing">, string> = {
  "changed-since":
    "Somebody changed the verdict while you wrote. Nothing was changed by you; read what it is now and decide again.",
  "not-now": "That can't be done with the verdict as it is now. Nothing was changed.",
};
