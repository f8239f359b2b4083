import type { z } from "zod";
import * as plates from "~/db/plates.server";
import { parseRecord } from "~/services/plates/record";
import { shownMentions } from "~/services/webmention/shown.server";
import { shapeShownMention } from "./mention-shapes.server.ts";
import type { plateShape, plateSummaryShape, withdrawnPlateShape } from "./plate-schemas.ts";

/** A plate in a list, as the API shows it. */
export function shapePlateSummary(plate: plates.ListedPlate): z.output<typeof plateSummaryShape> {
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

/** A plate as it was frozen, with its versions and with who cites it. */
export async function shapePlate(plate: plates.PlateRow): Promise<z.output<typeof plateShape>> {
  const [versions, mentions] = await Promise.all([
    plates.findVersions(plate),
    shownMentions({ plateId: plate.id }),
  ]);
  return {
    ...parseRecord(plate.record),
    versions: versions.map(({ publicId, version, createdAt, withdrawnAt }) => ({
      id: publicId,
      version,
      madeAt: createdAt.toISOString(),
      withdrawnAt: withdrawnAt?.toISOString() ?? null,
    })),
    mentions: mentions.map(shapeShownMention),
  };
}

export async function shapeWithdrawn(plate: plates.PlateRow): Promise<z.output<typeof withdrawnPlateShape>> {
  const versions = await plates.findVersions(plate);
  const newer = versions.filter(({ version, withdrawnAt }) => version > plate.version && !withdrawnAt).at(-1);
  return {
    id: plate.publicId,
    number: plate.number,
    version: plate.version,
    title: plate.title,
    withdrawnAt: (plate.withdrawnAt ?? new Date()).toISOString(),
    reason: plate.withdrawnReason ?? "",
    newer: newer?.publicId ?? null,
  };
}
