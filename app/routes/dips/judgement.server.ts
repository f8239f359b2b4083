import type { ProjectAccess } from "~/auth/require.server";
import * as dips from "~/db/dips.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import * as verdictEvents from "~/db/verdict-events.server";
import { notFound } from "~/errors";
import { formatFrequency } from "~/measurement/units";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { adviseOn, type TrimAdvice } from "~/services/advice.server";
import { judgeDip } from "~/services/causes.server";
import { evidenceFor, evidenceKey } from "~/services/verdict-evidence.server";
import { planHref, trimWords } from "./advice-words";

/** What may be behind a dip, what was held of it and on what evidence, and what to do next; 404 where it is not of this project. */
export async function loadJudgement({ project, person, may }: ProjectAccess, publicId: string) {
  const found = await dips.findByPublicId(publicId);
  if (!found || found.dip.projectId !== project.id) throw notFound("dip");
  const { dip } = found;
  const unit = lengthUnitOf(person);
  const [from, trail, bands] = await Promise.all([
    sweeps.findByPublicId(found.sweep.publicId),
    trails.findByDip(dip.id),
    projects.findDesignBands(project.id),
  ]);
  if (!from) throw notFound("sweep");
  const judged = await judgeDip(dip, from.sweep, unit);
  const [advice, events, evidence] = await Promise.all([
    adviseOn(dip, trail?.publicId ?? null, judged, bands, unit),
    verdictEvents.findAllOnDip(dip.id, trail?.id ?? null),
    may("verdict.propose") ? evidenceFor(dip, trail?.id ?? null, judged.causes) : [],
  ]);
  const { then } = judged;
  return {
    causes: judged.causes.map(({ key, title, arithmetic, byChance, test, path }) => ({
      key,
      title,
      arithmetic,
      byChance,
      test,
      joined: path?.joined ? true : undefined,
    })),
    tests: judged.tests.map(({ change, predictions }) => ({ change, predictions })),
    notJudged: judged.notJudged.map(({ name, reason }) => ({ name, reason })),
    antenna: {
      kind: then.kind,
      number: then.kind === "described" ? then.version.number : null,
      from: then.kind === "described" ? then.version.validFrom : null,
      describedFrom: then.kind === "before" ? then.describedFrom : null,
      day: from.sweep.takenAt?.toISOString().slice(0, 10) ?? null,
    },
    ripple:
      judged.ripplePeriodHz === null ? null : formatFrequency(Number(judged.ripplePeriodHz.toPrecision(4))),
    bench: judged.bench,
    advice: advice && {
      trims: advice.trims.map((one) => ({
        part: one.part,
        words: trimWords(one, advice.offset.band.name, advice.offset.targetHz, unit),
        changedSince: one.changedSince,
        plan: may("step.edit") && !one.changedSince ? planOf(project.publicId, one) : null,
      })),
    },
    verdictOfTrail: found.byTrail && trail ? { publicId: trail.publicId, label: trail.name } : null,
    history: events.map(({ event, by }) => ({
      publicId: event.publicId,
      verdict: event.verdict,
      text: event.text,
      evidence: event.evidence,
      ofTrail: event.trailId !== null,
      by,
      at: event.at,
    })),
    evidence: evidence.map((one) => ({ key: evidenceKey(one), kind: one.kind, text: one.text })),
  };

  function planOf(projectId: string, { part, name, trim }: TrimAdvice): string {
    return planHref(projectId, { part, name, toM: trim.lengthM, how: trim.how }, unit);
  }
}
