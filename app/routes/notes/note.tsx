import { data, redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { changeNoteSchema } from "~/components/notes/notes.schema";
import type { ThreadPlace } from "~/components/notes/place";
import { sendOrSayWhy } from "~/components/notes/unsent";
import { notFound, refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { editNote, type NoteChange, removeNote, restoreNote } from "~/services/note-changes.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/note";
import { backTo, isFromScript, pathOf } from "./place.server.ts";
import { findNote } from "./require-note.server.ts";

/** A note's permanent address: leads to the page on which it stands. */
export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "project.read");
  const found = await findNote(project.id, args.params.note);
  return redirect(`${pathOf(project, placeOf(found))}#note-${found.note.publicId}`);
}

export async function action(args: Route.ActionArgs) {
  const { project, person, may } = await requireProject(args, "note.write");
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const found = await findNote(project.id, args.params.note);
  const submission = parseForm(await args.request.formData(), { schema: changeNoteSchema });
  const stays = isFromScript(args.request);
  const page = pathOf(project, placeOf(found));
  const who = { project, notePublicId: found.note.publicId, by: person };
  if (submission.status !== "success") {
    if (stays) return data({ lastResult: submission.reply() }, { status: 400 });
    const to = backTo(String(submission.payload.returnTo ?? ""), page, found.note.publicId);
    return redirectWithMessage(to, "A note can't be empty or over its limit. It is as it was.");
  }
  const { value } = submission;
  switch (value.intent) {
    case "edit": {
      const outcome = await editNote({ ...who, body: value.body, revision: value.revision });
      if (typeof outcome === "object") {
        if (stays) return data(outcome, { status: 409 });
        return redirectWithMessage(backTo(value.returnTo, page, found.note.publicId), CHANGED_SINCE);
      }
      checkDone(outcome);
      if (stays) return { done: "edit" as const };
      return redirectWithMessage(backTo(value.returnTo, page, found.note.publicId), "The note is changed.");
    }
    case "remove":
      checkDone(await removeNote({ ...who, mayModerate: may("note.moderate") }));
      if (stays) return { done: "remove" as const };
      return redirectWithMessage(
        backTo(value.returnTo, page, found.note.publicId),
        "The note is removed. For ten seconds you can bring it back, where it stood.",
      );
    case "restore": {
      const outcome = await restoreNote(who);
      const message = outcome === "too-late" ? TOO_LATE : "The note is back.";
      if (outcome !== "too-late") checkDone(outcome);
      if (!stays) return redirectWithMessage(backTo(value.returnTo, page, found.note.publicId), message);
      if (outcome !== "too-late") return { done: "restore" as const };
      return data({ lastResult: submission.reply({ formErrors: [message] }) }, { status: 409 });
    }
    default:
      return value satisfies never;
  }
}

export function clientAction({ serverAction }: Route.ClientActionArgs) {
  return sendOrSayWhy(serverAction);
}

function placeOf(found: Awaited<ReturnType<typeof findNote>>): ThreadPlace {
  return {
    dip: found.dipPublicId ?? undefined,
    sweep: found.sweepPublicId ?? undefined,
    trail: found.trailPublicId ?? undefined,
    step: found.stepPublicId ?? undefined,
    bench: found.benchPublicId ?? undefined,
  };
}

function checkDone(change: NoteChange): void {
  if (change === "missing") throw notFound("note");
  if (change === "refused") throw refused("This note is somebody else's. Nothing was changed.");
}

const CHANGED_SINCE =
  "You changed this note in another window since this form was opened. Nothing was changed now; open “Change” again to see what it says.";
const TOO_LATE = "It is too late to bring it back: a removed note can be brought back for ten seconds.";
