import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import { writeNoteSchema } from "~/components/notes/notes.schema";
import { sendOrSayWhy } from "~/components/notes/unsent";
import { refused } from "~/errors";
import { redirectWithMessage } from "~/services/flash.server";
import { listThread } from "~/services/note-thread.server";
import { NoteProblem, writeNote } from "~/services/notes.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/notes";
import { takeGivenFiles } from "./given-files.server.ts";
import { requirePart } from "./part.server.ts";
import { backTo, isFromScript, pathOf, requirePlace, wishedPlace } from "./place.server.ts";

/** The thread of a dip (`?dip=`), a sweep, a trail, a step, a bench, or with none of them of the project. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const place = await requirePlace(access, wishedPlace(new URL(args.request.url).searchParams));
  return { thread: await listThread(place, access), mayWrite: access.may("note.write") };
}

export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "note.write");
  const { project, person } = access;
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const form = await args.request.formData();
  const submission = parseForm(form, { schema: writeNoteSchema });
  const stays = isFromScript(args.request);
  if (submission.status !== "success") {
    if (stays) return data({ lastResult: submission.reply() }, { status: 400 });
    const { body, returnTo } = submission.payload;
    const what = body ? "The note could not be taken as it is" : "The note was empty";
    return redirectWithMessage(
      backTo(String(returnTo ?? ""), pathOf(project, {})),
      `${what}. Nothing was stored.`,
    );
  }
  const { parent, body, clientKey, returnTo, dip, sweep, trail, step, bench, ...part } = submission.value;
  const wished = { dip, sweep, trail, step, bench };
  const place = await requirePlace(access, wished);
  const page = pathOf(project, wished);
  const files = await takeGivenFiles(form, { project, by: person });
  try {
    const written = await writeNote({
      project,
      author: person,
      place,
      parentPublicId: parent,
      part: await requirePart({ sweep, ...part }),
      body: [body, ...files.markdown].join("\n\n"),
      clientKey,
    });
    if (stays) return { publicId: written.publicId };
    const said = ["The note is stored.", ...files.refusals].join(" ");
    return redirectWithMessage(backTo(returnTo, page, written.publicId), said);
  } catch (error) {
    if (!(error instanceof NoteProblem)) throw error;
    if (!stays) return redirectWithMessage(backTo(returnTo, page), error.message);
    return data({ lastResult: submission.reply({ formErrors: [error.message] }) }, { status: 409 });
  }
}

export function clientAction({ serverAction }: Route.ClientActionArgs) {
  return sendOrSayWhy(serverAction);
}
