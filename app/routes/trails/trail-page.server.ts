import type { ProjectAccess } from "~/auth/require.server";
import { movementWords } from "~/charts/trail-words";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import * as trailStops from "~/db/trail-stops.server";
import * as trails from "~/db/trails.server";
import { notFound } from "~/errors";
import { completeDip } from "~/measurement/dips/complete";
import { agree } from "~/measurement/trails/decisions";
import { type TrailEvent, trailEvents } from "~/measurement/trails/events";
import { formatFrequency } from "~/measurement/units";
import { formatDate } from "~/services/dates";
import { plainText } from "~/services/markdown.server";
import { listThread } from "~/services/note-thread.server";
import { decisionOf, loadTrailSweeps } from "~/services/trails.server";
import { evidenceForTrail, evidenceKey } from "~/services/verdict-evidence.server";
import { expectationsOf } from "./expectations.server.ts";
import { wayOf } from "./way.server.ts";

/** Everything about one trail of this project, or 404. */
export async function loadTrailPage(access: ProjectAccess, publicId: string) {
  const { project, may } = access;
  const found = await trails.findByPublicId(publicId);
  if (!found || found.trail.projectId !== project.id) throw notFound("trail");
  const { trail } = found;
  const [stops, sweeps, members, all, decisions, events, notes, designBands, stepRows, thread, evidence] =
    await Promise.all([
      trailStops.findAllByTrail(trail.id),
      loadTrailSweeps(project.id),
      trails.findMembers(project.id),
      trails.findAllByProject(project.id),
      trails.findDecisions(project.id),
      trails.findVerdictEvents(trail.id),
      trailStops.findNotes(trail.id, MOST_NOTES),
      projects.findDesignBands(project.id),
      steps.findAllByProject(project.id),
      listThread({ projectId: project.id, sweepId: null, dipId: null, trailId: trail.id }, access),
      may("verdict.propose") ? evidenceForTrail(trail) : [],
    ]);
  const way = wayOf(stops.map((stop) => ({ ...stop, numbers: completeDip(stop.numbers) })));
  const [first, last] = [stops[0], stops[stops.length - 1]];
  const moved = first && last ? movementWords(first, last) : "";
  const own = new Set(stops.map(({ id }) => id));
  const sweepOf = new Map(sweeps.flatMap(({ id, dips }) => dips.map((dip) => [dip.id, id] as const)));
  const { overruled } = agree(
    decisions.map(({ decision }) => decisionOf(decision)),
    (id) => sweepOf.get(id),
  );
  return {
    project: { publicId: project.publicId },
    may: {
      correct: may("trail.correct"),
      propose: may("verdict.propose"),
      settle: may("verdict.settle"),
      write: may("note.write"),
    },
    trail: {
      publicId: trail.publicId,
      name: trail.name,
      verdict: trail.verdict,
      verdictText: trail.verdictText,
      verdictBy: found.verdictBy,
    },
    title:
      trail.name ||
      `Trail at ${formatFrequency(last?.frequencyHz ?? trail.frequencyHz, last?.frequencyUncertaintyHz ?? null)}`,
    seen: [seenWords(stops), moved].filter(Boolean).join(": "),
    stops: way,
    happened: happenedTo(trail.id, { sweeps, members, all }),
    expected: expectationsOf(trail.publicId, stepRows, stops),
    designBands: designBands.map(({ name, lowHz, highHz }) => ({ name, lowHz, highHz })),
    corrections: decisions
      .filter(({ decision }) => own.has(decision.oneId) || own.has(decision.otherId))
      .map(({ decision, by, one, other }) => ({
        kind: decision.decision,
        by,
        at: decision.at,
        one: { ...one, frequency: formatFrequency(one.frequencyHz) },
        other: { ...other, frequency: formatFrequency(other.frequencyHz) },
        overruled: overruled.some(
          ({ a, b, kind }) =>
            a === String(decision.oneId) && b === String(decision.otherId) && kind === decision.decision,
        ),
      })),
    others: all
      .filter((other) => other.id !== trail.id)
      .map((other) => ({
        publicId: other.publicId,
        label: other.name || formatFrequency(other.frequencyHz),
        stops: members.filter(({ trailId }) => trailId === other.id).length,
      })),
    history: events.map(({ event, by }) => ({
      publicId: event.publicId,
      verdict: event.verdict,
      text: event.text,
      evidence: event.evidence,
      by,
      at: event.at,
    })),
    evidence: evidence.map((one) => ({ key: evidenceKey(one), kind: one.kind, text: one.text })),
    thread,
    notes: notes.map(({ body, ...note }) => ({ ...note, line: plainText(body, 220) })),
    moreNotes: way.reduce((sum, { noteCount }) => sum + noteCount, 0) - notes.length,
  };
}
export type TrailPageData = Awaited<ReturnType<typeof loadTrailPage>>;

interface Known {
  sweeps: Awaited<ReturnType<typeof loadTrailSweeps>>;
  members: { dipId: number; trailId: number }[];
  all: trails.TrailRow[];
}

/** Appearing, vanishing, splitting and merging, in words that name the sweep. */
function happenedTo(trailId: number, { sweeps, members, all }: Known) {
  const trailOf = new Map(members.map((member) => [String(member.dipId), member.trailId]));
  const ways = all.map(({ id }) => ({
    stops: sweeps.flatMap(({ dips }, sweepIndex) =>
      dips.filter((dip) => trailOf.get(dip.id) === id).map((dip) => ({ sweepIndex, dip, by: null })),
    ),
  }));
  const there = all.filter((_, i) => ways[i].stops.length > 0);
  const index = there.findIndex(({ id }) => id === trailId);
  if (index < 0) return [];
  const events = trailEvents(
    ways.filter(({ stops }) => stops.length > 0),
    sweeps,
  );
  const told: {
    kind: TrailEvent["kind"];
    sweeps: string[];
    other: { publicId: string; label: string } | null;
  }[] = [];
  for (const { kind, sweepIndex, otherTrail } of events[index]) {
    const { title } = sweeps[sweepIndex];
    const before = told.find((one) => one.kind === kind && otherTrail === null);
    if (before) {
      before.sweeps.push(title);
      continue;
    }
    const other = otherTrail === null ? null : there[otherTrail];
    const label = other && (other.name || formatFrequency(other.frequencyHz));
    told.push({ kind, sweeps: [title], other: other && { publicId: other.publicId, label: label ?? "" } });
  }
  return told;
}

function seenWords(stops: { at: Date | null }[]): string {
  if (stops.length === 0) return "Seen in no sweep now";
  const days = stops.flatMap(({ at }) => (at ? [formatDate(at)] : []));
  const where = stops.length === 1 ? "Seen in one sweep" : `Seen in ${stops.length} sweeps`;
  if (days.length === 0) return where;
  const [from, to] = [days[0], days[days.length - 1]];
  return from === to ? `${where}, ${from}` : `${where}, ${from} to ${to}`;
}

const MOST_NOTES = 30;
