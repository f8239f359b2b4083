import { data } from "react-router";
import { requireProject } from "~/auth/require.server";
import { refused } from "~/errors";
import { look, lookAway } from "~/services/presence.server";
import type { Route } from "./+types/looking";
import { lookingSchema } from "./looking.schema.ts";

/** A member's window says what it looks at. */
export async function action(args: Route.ActionArgs) {
  const { project, person, membership } = await requireProject(args, "project.read");
  if (!person || !membership) throw refused("Only members of the project are shown as looking.");
  const parsed = lookingSchema.safeParse(Object.fromEntries(await args.request.formData()));
  if (!parsed.success) throw data("That does not say what is looked at.", 400);
  const { window, away, kind, subject } = parsed.data;
  if (away) await lookAway({ by: person, window });
  else await look({ project, by: person, window, kind, subject });
  return new Response(null, { status: 204 });
}
