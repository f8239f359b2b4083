import { data, redirect } from "react-router";
import { safePath } from "~/auth/next";
import { type Person, requireProject } from "~/auth/require.server";
import { sendOrSayWhy } from "~/components/notes/unsent";
import { verdictSchema } from "~/components/notes/verdict.schema";
import * as dips from "~/db/dips.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { notFound, refused } from "~/errors";
import { lengthUnitOf } from "~/routes/antenna/sizes";
import { judgeDip } from "~/services/causes.server";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { chosenEvidence, evidenceFor } from "~/services/verdict-evidence.server";
import { changeVerdict, type VerdictChange, type VerdictIntent } from "~/services/verdicts.server";
import type { Route } from "./+types/verdict";

/** Propose (commenters), settle or reopen (experimenters) the explanation of a dip. */
export async function action(args: Route.ActionArgs) {
  const { project, person, may } = await requireProject(args, "verdict.propose");
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const found = await dips.findByPublicId(args.params.dip);
  if (!found || found.dip.projectId !== project.id) throw notFound("dip");
  const submission = parseForm(await args.request.formData(), { schema: verdictSchema });
  if (submission.payload.intent !== "propose" && !may("verdict.settle")) {
    throw refused("Settling and reopening is for experimenters and owners. Nothing was changed.");
  }
  const page = `/projects/${project.publicId}/dips/${found.dip.publicId}`;
  const to = safePath(submission.payload.returnTo, page);
  const stays = new URL(args.request.url).pathname.endsWith(".data");
  if (submission.status !== "success") {
    if (stays) return data({ lastResult: submission.reply() }, { status: 400 });
    return redirectWithMessage(to, "The verdict needs a few words. Nothing was changed.");
  }
  const { intent, text, was, note, evidence: keys = [] } = submission.value;
  const evidence = keys.length > 0 ? chosenEvidence(keys, await offeredEvidence(found, person)) : [];
  const change = await changeVerdict({
    dip: found.dip,
    by: person,
    intent,
    text,
    was,
    evidence,
    details: note?.trim(),
  });
  if (change === "missing") throw notFound("dip");
  if (change === "done") return stays ? { done: intent } : redirectWithMessage(to, DONE[intent]);
  if (!stays) return redirectWithMessage(to, PROBLEMS[change]);
  return data({ lastResult: submission.reply({ formErrors: [PROBLEMS[change]] }) }, { status: 409 });
}

/** All that may be chosen for this dip, as it reads for this person. */
async function offeredEvidence({ dip, sweep }: Found, person: Person) {
  const [from, trail] = await Promise.all([sweeps.findByPublicId(sweep.publicId), trails.findByDip(dip.id)]);
  const judged = from && (await judgeDip(dip, from.sweep, lengthUnitOf(person)));
  return evidenceFor(dip, trail?.id ?? null, judged?.causes ?? []);
}

type Found = NonNullable<Awaited<ReturnType<typeof dips.findByPublicId>>>;

export function clientAction({ serverAction }: Route.ClientActionArgs) {
  return sendOrSayWhy(serverAction);
}

export async function loader(args: Route.LoaderArgs) {
  await requireProject(args, "project.read");
  return redirect(`/projects/${args.params.project}/dips/${args.params.dip}`);
}

const DONE: Record<VerdictIntent, string> = {
  propose: "The explanation is proposed.",
  settle: "The dip is settled.",
  reopen: "The dip is open again.",
};

const PROBLEMS: Record<Exclude<VerdictChange, "done" | "missing">, string> = {
  "changed-since":
    "Somebody changed the verdict while you wrote. Nothing was changed by you; read what it is now and decide again.",
  "not-now": "That can't be done with the verdict as it is now. Nothing was changed.",
};
