import * as bundleRuns from "~/db/bundle-runs.server";
import { inTransaction } from "~/db/client.server";
import * as closing from "~/db/closing.server";
import * as emailCodes from "~/db/email-codes.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import * as outbox from "~/db/outbox.server";
import * as people from "~/db/people.server";
import { record } from "./events.server.ts";

/** Closing an account for good, at its owner's wish. */

export type Closing =
  | { kind: "closed" }
  /** These would be left without an owner. */
  | { kind: "owns"; projects: { publicId: string; title: string }[] }
  | { kind: "last-administrator" };

export type NotesThen = "stay" | "go";

/**
 * Everything by which the person is known goes; sweeps, steps and verdicts stay with their projects, under "former
 * member", and so do the notes, or they go. All in one write: it is done or it is not.
 */
export function closeAccount(userId: number, notesThen: NotesThen): Promise<Closing> {
  return inTransaction(async (tx) => {
    const administrators = await people.lockAdministrators(tx);
    if (administrators.length === 1 && administrators[0].id === userId) return { kind: "last-administrator" };
    const projectIds = await closing.lockMemberships(userId, tx);
    const owned = await closing.findOnlyOwned(userId, tx);
    if (owned.length > 0) return { kind: "owns", projects: owned };
    const user = await people.lock(userId, tx);
    if (!user || user.closedAt) return { kind: "closed" };
    if (notesThen === "go") {
      const keys = await closing.findAttachmentKeys(userId, tx);
      await jobs.insertAll(
        "delete-object",
        keys.map((key) => ({ key })),
        tx,
      );
      await closing.removeNotes(userId, tx);
    }
    for (const projectId of projectIds) {
      const about = { title: FORMER };
      await record({ projectId, kind: "member.left", actorId: userId, about }, tx);
    }
    await closing.forgetName(user.name, projectIds, tx);
    await closing.deleteTraces(userId, tx);
    const bundles = await bundleRuns.deleteByUser(userId, tx);
    await jobs.insertAll(
      "delete-object",
      bundles.map((key) => ({ key })),
      tx,
    );
    await outbox.deleteUnsentByUser(userId, tx);
    if (user.email) await emailCodes.deleteByEmail(user.email, tx);
    await people.update(userId, { ...NOBODY, userName: `former-${newPublicId()}`, closedAt: new Date() }, tx);
    return { kind: "closed" };
  });
}

const FORMER = "A former member";
const NOBODY = {
  name: FORMER,
  email: null,
  administrator: false,
  callSign: "",
  ituRegion: null,
  timeZone: "UTC",
  lastSeenAt: null,
};
