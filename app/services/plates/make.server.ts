import { createHmac } from "node:crypto";
import { isDuplicate } from "~/db/client.server";
import * as plates from "~/db/plates.server";
import { env } from "~/env.server";
import { type Freeze, freeze } from "./freeze.server.ts";
import type { Problem } from "./gather.server.ts";

export interface MakePlate extends Omit<Freeze, "publicId" | "at"> {
  /** Made by whoever sends: sent twice, one plate is made. Null where nobody sends twice. */
  draw: string | null;
}

/** Freezes a plate, once however often it is asked with the same draw. */
export async function makePlate({ draw, ...asked }: MakePlate): Promise<{ publicId: string } | Problem> {
  if (!draw) return freeze(asked);
  const publicId = idOf(asked, draw);
  const first = async () => ((await plates.findByPublicId(publicId)) ? { publicId } : undefined);
  try {
    const made = (await first()) ?? (await freeze({ ...asked, publicId }));
    // What stood in the way may have been the first of the two.
    return "problem" in made ? ((await first()) ?? made) : made;
  } catch (error) {
    const before = isDuplicate(error) ? await first() : undefined;
    if (before) return before;
    throw error;
  }
}

/** The plate that this draw made already. */
export async function findMade(
  asked: Pick<MakePlate, "project" | "by">,
  draw: string,
): Promise<plates.PlateRow | undefined> {
  return draw ? plates.findByPublicId(idOf(asked, draw)) : undefined;
}

/** A public id that nobody can choose, the same for the same draw. */
function idOf({ project, by }: Pick<MakePlate, "project" | "by">, draw: string): string {
  const text = `plate ${project.publicId} ${by.id} ${draw}`;
  const digest = createHmac("sha256", env.SESSION_SECRET).update(text).digest();
  return Array.from(digest.subarray(0, LENGTH), (byte) => LETTERS[byte % LETTERS.length]).join("");
}

/** As `newPublicId`. */
const LETTERS = "23456789abcdefghjkmnpqrstuvwxyz";
const LENGTH = 10;
