import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { changeNoteSchema } from "~/components/notes/notes.schema";
import { sendOrSayWhy } from "~/components/notes/unsent";
import * as notes from "~/db/notes.server";
import { notFound, refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { editNote, type NoteChange, removeNote } from "~/services/notes.server";
import type { Route } from "./+types/note";
import { backTo, isFromScript, pathOf } from "./place.server.ts";

/** A note's permanent address: leads to the page on which it stands. */
export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "project.read");
  const found = await requireNote(project.id, args.params.note);
  return redirect(`${pathOf(project, placeOf(found))}#note-${found.note.publicId}`);
}

export async function action(args: Route.ActionArgs) {
  const { project, person, may } = await requireProject(args, "note.write");
  if (!person) throw refused("Sign in first. Nothing was changed.");
  const found = await requireNote(project.id, args.params.note);
  const submission = parseWithZod(await args.request.formData(), { schema: changeNoteSchema });
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
    case "edit":
      checkDone(await editNote({ ...who, body: value.body }));
      if (stays) return { done: "edit" as const };
      return redirectWithMessage(backTo(value.returnTo, page, found.note.publicId), "The note is changed.");
    case "remove":
      checkDone(await removeNote({ ...who, mayModerate: may("note.moderate") }));
      if (stays) return { done: "remove" as const };
      return redirectWithMessage(backTo(value.returnTo, page), "The note is removed.");
    default:
      return value satisfies never;
  }
}

export function clientAction({ serverAction }: Route.ClientActionArgs) {
  return sendOrSayWhy(serverAction);
}

async function requireNote(projectId: number, publicId: string) {
  const found = await notes.findByPublicId(publicId);
  if (!found || found.note.projectId !== projectId) throw notFound("note");
  return found;
}

function placeOf(found: { dipPublicId: string | null; sweepPublicId: string | null }) {
  return { dip: found.dipPublicId, sweep: found.sweepPublicId };
}

function checkDone(change: NoteChange): void {
  if (change === "missing") throw notFound("note");
  if (change === "refused") throw refused("This note is somebody else's. Nothing was changed.");
}
