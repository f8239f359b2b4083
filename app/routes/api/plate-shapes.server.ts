import type { z } from "zod";
import type { ListedPlate } from "~/db/plates.server";
import type { plateSummaryShape } from "./plate-schemas.ts";

/** A plate in a list, as the API shows it. */
export function shapePlateSummary(plate: ListedPlate): z.output<typeof plateSummaryShape> {
  const { publicId, number, version, kind, title, licence, by } = plate;
  return {
    id: publicId,
    number,
    version,
    kind,
    title,
    licence,
    madeAt: plate.createdAt.toISOString(),
    madeBy: by,
    withdrawnAt: plate.withdrawnAt?.toISOString() ?? null,
    links: { self: `/api/v1/plates/${publicId}`, page: `/plates/${publicId}` },
  };
}
