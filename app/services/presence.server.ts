import { createHash } from "node:crypto";
import * as presence from "~/db/presence.server";
import type { Looker } from "./live-shape.ts";

export interface Look {
  project: { id: number };
  by: { id: number };
  /** Random, of one window. */
  window: string;
  kind: string;
  subject: string;
}

/** Says that a member's window looks at something; said anew every so often, else it is forgotten. */
export async function look({ project, by, window, kind, subject }: Look): Promise<void> {
  const at = new Date();
  await presence.put({ id: rowOf(by, window), projectId: project.id, userId: by.id, kind, subject, at });
}

export function lookAway({ by, window }: Pick<Look, "by" | "window">): Promise<void> {
  return presence.deleteById(rowOf(by, window));
}

/** Who looks at each of these projects. */
export async function lookersOf(projectIds: readonly number[]): Promise<Map<number, Looker[]>> {
  const rows = await presence.findAllByProjects(projectIds, new Date(Date.now() - FORGOTTEN_AFTER_MS));
  const byProject = new Map<number, Looker[]>(projectIds.map((id) => [id, []]));
  for (const { projectId, ...looker } of rows) byProject.get(projectId)?.push(looker);
  return byProject;
}

/** Rows that mean nothing any more. */
export function forgetOldLooks(): Promise<void> {
  return presence.deleteBefore(new Date(Date.now() - 10 * FORGOTTEN_AFTER_MS));
}

/** Of the person's own: nobody moves somebody else's window. */
function rowOf(by: { id: number }, window: string): string {
  return createHash("sha256").update(`${by.id} ${window}`).digest("hex");
}

/** Windows say it every 20 s, so that one lost word is no going away. */
const FORGOTTEN_AFTER_MS = 50_000;
