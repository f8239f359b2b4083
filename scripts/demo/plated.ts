import * as people from "~/db/people.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import type { PlateChoices } from "~/services/plates/choices";
import { propose } from "~/services/plates/compose.server";
import { freeze } from "~/services/plates/freeze.server";
import { subjectOf } from "~/services/plates/subject";
import type { Who } from "./cast.ts";
import { deed } from "./deeds.ts";
import { idOf, type Stage } from "./stage.ts";
import type { Step } from "./story.ts";

export interface Plated {
  key: string;
  /** "sweep:ID", "strip" and so on. */
  of: (stage: Stage) => string | Promise<string>;
  chosen: Partial<PlateChoices>;
  /** The plate that it mends, and what was wrong with that. */
  mends?: { key: string; reason: string };
}

/** Freezes a plate of what the project holds at that point of the story. */
export function plated(by: Who, at: Date, { key, of, chosen, mends }: Plated): Step {
  return deed(by, at, async (stage, who) => {
    const [subject, person] = [subjectOf(await of(stage)), await people.findById(who.id)];
    const project = (await projects.findWithRoleById(stage.project.id, who.id))?.project;
    if (!subject || !project || !person) throw new Error(`The demo's plate "${key}" is of nothing.`);
    const proposed = await propose(project, subject);
    if ("problem" in proposed) throw new Error(`The demo's plate "${key}": ${proposed.problem}`);
    const mended = mends && (await plates.findByPublicId(idOf(stage.plateIds, mends.key, "plate")));
    const made = await freeze({
      project,
      subject,
      choices: { ...proposed, ...chosen },
      by: person,
      at,
      ...(mends && mended && { mends: { plate: mended, reason: mends.reason } }),
    });
    if ("problem" in made) throw new Error(`The demo's plate "${key}": ${made.problem}`);
    stage.plateIds.set(key, made.publicId);
  });
}
