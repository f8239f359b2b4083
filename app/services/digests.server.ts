import { inTransaction } from "~/db/client.server";
import * as mailChoices from "~/db/mail-choices.server";
import * as notices from "~/db/notices.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { digestDue } from "./digest-times.ts";
import { onceKeyOf } from "./mail-wanted.server.ts";
import { mailNotices } from "./notice-mails.server.ts";

/** Mails what is due by now: one mail a person and project, of what was neither read nor mailed. Any process may ask. */
export async function sendDigests(now = new Date()): Promise<void> {
  const since = new Date(now.getTime() - FORGOTTEN_MS);
  for (const { userId, projectId } of await notices.findWaiting(["hourly", "daily"], since)) {
    await sendDigest(userId, projectId, now);
  }
}

async function sendDigest(userId: number, projectId: number, now: Date): Promise<void> {
  const [person, found] = await Promise.all([
    people.findById(userId),
    projects.findWithRoleById(projectId, userId),
  ]);
  if (!person || !found?.role || person.suspendedAt || person.closedAt) return;
  const { project } = found;
  const mode = (await mailChoices.findModes([userId], project.publicId)).get(userId);
  if (mode !== "hourly" && mode !== "daily") return;
  const { key, before } = digestDue(mode, person.timeZone, now);
  await inTransaction(async (tx) => {
    const waiting = await notices.lockUnmailed(userId, projectId, tx);
    const due = waiting.filter(({ at }) => at < before).map(({ id }) => id);
    if (due.length === 0) return;
    await mailNotices(project, person, due, onceKeyOf("digest", userId, projectId, `${mode} ${key}`), tx);
  });
}

/** What nobody took along for so long is not mailed any more. */
const FORGOTTEN_MS = 30 * 24 * 60 * 60 * 1000;
