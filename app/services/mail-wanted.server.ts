import * as mailChoices from "~/db/mail-choices.server";

/** What a mail about a project may be written once for: whose it is and of which project stand in it. */
export function onceKeyOf(
  kind: "notice" | "digest",
  userId: number,
  projectId: number,
  which: string | number,
): string {
  return `${kind}:${userId}:${projectId}:${which}`;
}

/**
 * Asked once more right before a mail is sent, for it may have waited: who lost access to the project since, changed the
 * address, or wants no more of it gets nothing. Any other mail is wanted.
 */
export async function isStillWanted(onceKey: string, toAddress: string): Promise<boolean> {
  const found = /^(?:notice|digest):(\d+):(\d+):/.exec(onceKey);
  if (!found) return true;
  return mailChoices.mayBeMailed(Number(found[1]), Number(found[2]), toAddress);
}
