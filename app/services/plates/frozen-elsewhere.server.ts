import { findTakenInAt } from "~/db/bundle-rows.server";
import type { PlateRow } from "~/db/plates.server";
import { env } from "~/env.server";
import type { PlateRecord } from "./record.ts";

/** Where a plate was frozen that stands at another address now; `at`: when a bundle brought it, null where that is not known. */
export interface FrozenElsewhere {
  address: string;
  /** Not even of this site. */
  otherSite: boolean;
  at: Date | null;
}

/** Null for a plate that was frozen here. */
export async function frozenElsewhere(
  plate: Pick<PlateRow, "publicId" | "createdBy">,
  { address }: Pick<PlateRecord, "address">,
): Promise<FrozenElsewhere | null> {
  if (address === `${env.BASE_URL}/plates/${plate.publicId}`) return null;
  const origin = /^https?:/.test(address) && URL.canParse(address) ? new URL(address).origin : null;
  const at = plate.createdBy === null ? undefined : await findTakenInAt(plate.createdBy);
  return { address, otherSite: origin !== new URL(env.BASE_URL).origin, at: at ?? null };
}
