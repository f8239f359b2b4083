import { formatFrequency, formatSwr, formatWidth, formatWidthLimits } from "../../../measurement/units.ts";
import type { PlateDip, PlateFigure } from "../record.ts";
import { letterOf } from "./lettering.ts";
import { drawnDips } from "./values.ts";

/** A line under the figure: its letter, and what that stands for. */
export interface KeyLine {
  letter: string;
  /** Of the trace styles, for lines; null for dips. */
  style: number | null;
  text: string;
}

/** What the letters of a figure stand for. Pure. */
export function keyOf(figure: PlateFigure): KeyLine[] {
  if (figure.form !== "curves") return [];
  const one = figure.traces.length === 1;
  const traces: KeyLine[] = one
    ? []
    : figure.traces.map(({ label, caption }, style) => ({
        letter: traceLetter(style),
        style,
        text: `${label}, ${caption}`,
      }));
  const groups = groupsOf(figure);
  const dips = groups.slice(0, MOST_DIPS).map((own, i): KeyLine => {
    const words = own.map((dip) => {
      const trace = figure.traces.findIndex(({ id }) => id === dip.trace);
      return `${one ? "" : `${traceLetter(trace)} `}${dipWords(dip, figure, one)}`;
    });
    return { letter: letterOf(i), style: null, text: words.join(" · ") };
  });
  const more = groups.length - dips.length;
  if (more > 0) dips.push({ letter: "", style: null, text: `and ${more} more dips: see the plate’s table` });
  return [...traces, ...dips];
}

/** The letter of each dip that has one. */
export function lettersOf(figure: PlateFigure): Map<string, string> {
  const groups = groupsOf(figure).slice(0, MOST_DIPS);
  return new Map(groups.flatMap((own, i) => own.map(({ id }) => [id, letterOf(i)] as const)));
}

/** A, B, C of the traces of a comparison. */
export function traceLetter(index: number): string {
  return letterOf(index).toUpperCase();
}

/** Dips that are one and the same in several traces share a letter; in the order of the axis. */
function groupsOf(figure: PlateFigure): PlateDip[][] {
  const dips = drawnDips(figure);
  const groups = new Map<string, PlateDip[]>();
  for (const dip of dips) {
    const trail = figure.trails.find(({ stops }) => stops.some((stop) => stop.dip === dip.id));
    const key = trail?.id ?? dip.id;
    groups.set(key, [...(groups.get(key) ?? []), dip]);
  }
  const order = new Map(figure.traces.map(({ id }, i) => [id, i]));
  const rank = (dip: PlateDip) => order.get(dip.trace) ?? 0;
  return [...groups.values()].map((own) => [...own].sort((a, b) => rank(a) - rank(b)));
}

function dipWords(dip: PlateDip, { show }: PlateFigure, long: boolean): string {
  const { bandwidth } = dip;
  const frequency = formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz);
  const swr = dip.minimumSwr ?? Number.POSITIVE_INFINITY;
  const high = dip.minimumSwrHigh ?? (dip.minimumSwrLow === null ? null : Number.POSITIVE_INFINITY);
  const words = [
    dip.label && long ? `${dip.label}: ${frequency}` : frequency,
    `SWR ${show.limits ? formatSwr(swr, dip.minimumSwrLow, high) : formatSwr(swr)}`,
  ];
  if (!long) return words.join(", ");
  if (show.limits && dip.minimumSwrLow === null) words[1] += " (limits unknown)";
  if (bandwidth) {
    const width = show.limits
      ? formatWidthLimits(bandwidth.widthHz, bandwidth.widthLowHz, bandwidth.widthHighHz)
      : formatWidth(bandwidth.widthHz);
    words.push(
      `${bandwidth.open ? "at least " : ""}${width} under SWR ${Number(bandwidth.limitSwr.toFixed(2))}`,
    );
  }
  if (dip.inDesignBand === false) words.push("outside the design bands");
  return words.join(", ");
}

/** As many lines as leave the figure larger than its words. */
const MOST_DIPS = 12;
