import type { ProjectRole } from "~/auth/permissions";
import * as attachments from "~/db/attachments.server";
import * as blocks from "~/db/blocks.server";
import * as bundleRuns from "~/db/bundle-runs.server";
import { inTransaction, isDuplicate, type Transaction } from "~/db/client.server";
import * as files from "~/db/files.server";
import * as jobs from "~/db/jobs.server";
import * as notices from "~/db/notices.server";
import * as people from "~/db/people.server";
import * as photographs from "~/db/photographs.server";
import * as projects from "~/db/projects.server";
import { record } from "./events.server.ts";
import { conflictOf, mergeEdit } from "./merge-edit.ts";
import { mailAtOnce } from "./notice-mails.server.ts";

/** Makes a project with its first owner. */
export function createProject(project: projects.NewProject, ownerId: number) {
  return inTransaction(async (tx) => {
    const made = await projects.insert(project, tx);
    await projects.insertMember(made.id, ownerId, "owner", tx);
    return made;
  });
}

/** Removes the project with all that hangs on it; its stored originals go in the background, in the same write. */
export function deleteProject(id: number): Promise<void> {
  return inTransaction(async (tx) => {
    // Locked before the keys are read: an upload under way is either seen here or finds no project.
    await projects.lock(id, tx);
    const keys = [
      ...(await files.findStorageKeys(id, tx)),
      ...(await photographs.findStorageKeys(id, tx)),
      ...(await attachments.findStorageKeys(id, tx)),
      ...(await bundleRuns.findStorageKeys(id, tx)),
    ];
    await jobs.insertAll(
      "delete-object",
      keys.map((key) => ({ key })),
      tx,
    );
    await projects.deleteById(id, tx);
  });
}

export type AboutValues = Pick<projects.Project, "title" | "summary" | "visibility" | "ituRegion">;

/** Keeps what a person changed of what a project says of itself; where that meets another's change, answers what to ask and writes nothing. */
export function changeAbout(
  id: number,
  was: Partial<AboutValues>,
  wanted: AboutValues,
  by: number | null = null,
): Promise<ReturnType<typeof conflictOf> | null> {
  return inTransaction(async (tx) => {
    const project = await projects.lock(id, tx);
    const { title, summary, visibility, ituRegion } = project ?? wanted;
    const now = { title, summary, visibility, ituRegion };
    const merged = mergeEdit(was, now, wanted);
    if (merged.conflicts.length > 0) return conflictOf(now, wanted, merged);
    if (Object.keys(merged.changes).length > 0) {
      await projects.update(id, merged.changes, tx);
      const about = { title: merged.changes.title ?? now.title };
      await record({ projectId: id, kind: "project.changed", actorId: by, about }, tx);
    }
    return null;
  });
}

export type BandValues = Parameters<typeof projects.replaceDesignBands>[1][number];

export async function changeBands(
  projectId: number,
  bands: BandValues[],
  by: number | null = null,
): Promise<void> {
  await inTransaction(async (tx) => {
    await projects.lock(projectId, tx);
    await projects.replaceDesignBands(projectId, bands, tx);
    const about = { title: "The design bands" };
    await record({ projectId, kind: "project.changed", actorId: by, about }, tx);
  });
}

/** The licence that is proposed for its next plates; those that are made keep theirs. */
export async function changeLicence(
  projectId: number,
  licence: string,
  by: number | null = null,
): Promise<void> {
  await inTransaction(async (tx) => {
    await projects.update(projectId, { licence }, tx);
    const about = { title: "The licence of its plates" };
    await record({ projectId, kind: "project.changed", actorId: by, about }, tx);
  });
}

/** `unwilling`: the person blocked whoever adds. */
export type AddedMember = "added" | "already" | "unknown" | "unwilling";

/** Adds a member by user name. Adding someone who is there already changes nothing, not even the role. */
export async function addMember(
  projectId: number,
  userName: string,
  role: ProjectRole,
  by: number | null = null,
): Promise<AddedMember> {
  const user = await people.findByUserName(userName);
  if (!user || user.suspendedAt || user.closedAt) return "unknown";
  if (by !== null && (await blocks.exists(user.id, by))) return "unwilling";
  try {
    await inTransaction(async (tx) => {
      await projects.lock(projectId, tx);
      await projects.insertMember(projectId, user.id, role, tx);
      const about = { title: user.name };
      const eventId = await record({ projectId, kind: "member.joined", actorId: by, about }, tx);
      if (by !== null && by !== user.id) await tellAdded(projectId, user, eventId, tx);
    });
    return "added";
  } catch (error) {
    if (isDuplicate(error)) return "already";
    throw error;
  }
}

/** In the inbox of whoever was added, and by mail as that person likes it. */
async function tellAdded(projectId: number, user: people.User, eventId: number, tx: Transaction) {
  const project = await projects.lock(projectId, tx);
  const notice = { userId: user.id, projectId, eventId, noteId: null, reason: "invited" as const };
  const made = await notices.insertNew([notice], tx);
  if (project) await mailAtOnce(project, [user], made, tx);
}

export type MemberChange = "done" | "last-owner" | "not-a-member";

/** Gives a member another role; the last owner stays one. */
export function changeRole(
  projectId: number,
  userName: string,
  role: ProjectRole,
  by: number | null = null,
): Promise<MemberChange> {
  return changeMember(projectId, userName, role !== "owner", async (user, tx) => {
    await projects.updateMember(projectId, user.id, role, tx);
    await record({ projectId, kind: "member.changed", actorId: by, about: { title: user.name } }, tx);
  });
}

/** Removes a member, or lets one leave; the last owner can't go. */
export function removeMember(
  projectId: number,
  userName: string,
  by: number | null = null,
): Promise<MemberChange> {
  return changeMember(projectId, userName, true, async (user, tx) => {
    await projects.deleteMember(projectId, user.id, tx);
    await record({ projectId, kind: "member.left", actorId: by, about: { title: user.name } }, tx);
  });
}

function changeMember(
  projectId: number,
  userName: string,
  takesOwnership: boolean,
  change: (user: people.User, tx: Transaction) => Promise<void>,
): Promise<MemberChange> {
  return inTransaction(async (tx) => {
    await projects.lock(projectId, tx);
    const owners = await projects.lockOwners(projectId, tx);
    const user = await people.findByUserName(userName, tx);
    const role = user && (await projects.lockMember(projectId, user.id, tx));
    if (!user || !role) return "not-a-member";
    if (takesOwnership && role === "owner" && owners.length === 1) return "last-owner";
    await change(user, tx);
    return "done";
  });
}
