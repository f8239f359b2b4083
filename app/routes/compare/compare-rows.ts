import type { Movement } from "~/measurement/movement";
import { formatPercent, formatWidth } from "~/measurement/units";
import type { ComparedRow, ComparedSweep } from "~/services/compare.server";

/** A row of dips as it is sent to the page. */
export function shapeRow({ cells }: ComparedRow, sweeps: ComparedSweep[], reference: number) {
  const own = cells.flatMap(({ dip }) => dip ?? []);
  return {
    id: own[0]?.publicId ?? "",
    /** Of the trail of the first that is on a named one. */
    name: own.find(({ trailName }) => trailName)?.trailName ?? "",
    aboutHz: Math.exp(own.reduce((sum, { frequencyHz }) => sum + Math.log(frequencyHz), 0) / own.length),
    cells: cells.map(({ dip, movement }, i) => ({
      sweep: sweeps[i].sweep.publicId,
      isReference: i === reference,
      dip: dip && {
        href: `/projects/${sweeps[i].project.publicId}/dips/${dip.publicId}`,
        frequencyHz: dip.frequencyHz,
        frequencyUncertaintyHz: dip.frequencyUncertaintyHz,
        minimumSwr: dip.minimumSwr,
        low: dip.minimumSwrLow ?? dip.minimumSwrNoiseLow,
        high: dip.minimumSwrHigh ?? dip.minimumSwrNoiseHigh,
        widthHz: dip.bandwidth?.widthHz ?? null,
        widthUncertaintyHz: dip.bandwidth?.widthUncertaintyHz ?? null,
        limitSwr: dip.bandwidth?.limitSwr ?? null,
        open: dip.bandwidth?.open ?? false,
      },
      larger: movement?.kind === "moved",
      words: cellWords(movement, sweeps[i], own[0]?.frequencyHz ?? Number.NaN, dip !== null),
    })),
  };
}

export type ShownRow = ReturnType<typeof shapeRow>;

/** Against the reference; empty for the reference itself. */
function cellWords(
  movement: Movement | null,
  { at }: ComparedSweep,
  aboutHz: number,
  hasDip: boolean,
): string {
  if (!hasDip) {
    const { frequencyHz } = at.sweep;
    const reached = aboutHz > frequencyHz[0] && aboutHz < frequencyHz[frequencyHz.length - 1];
    return reached ? "no such dip" : "does not reach here";
  }
  if (!movement) return "";
  const { kind, byHz, uncertaintyHz, before } = movement;
  const by =
    byHz === null ? "unknown" : `${byHz < 0 ? "−" : "+"}${formatWidth(Math.abs(byHz), uncertaintyHz)}`;
  const half = formatWidth(uncertaintyHz, uncertaintyHz);
  const share =
    byHz === null || !before
      ? ""
      : ` (${byHz < 0 ? "−" : "+"}${formatPercent(Math.abs(byHz) / before.frequencyHz)})`;
  switch (kind) {
    case "moved":
      return `${by} ± ${half}${share}`;
    case "still":
      return `${by} ± ${half}: within its limits`;
    case "unsure":
      return `${by}${share}, limits unknown`;
    case "appeared":
      return "the reference has none";
    case "unseen":
      return "the reference does not reach here";
    case "vanished":
      return "no such dip";
  }
}
