import { analyse } from "../../app/measurement/analyse.ts";
import { DEFAULT_SETTINGS, type Dip, type Sweep } from "../../app/measurement/sweep.ts";
import { assign } from "../../app/measurement/trails/assignment.ts";
import type { TrailSweep } from "../../app/measurement/trails.ts";
import { type Complex, NO_FEEDLINE, type Resonator, reflection } from "../demo/antenna.ts";
import { gaussBy, randomBy } from "../demo/random.ts";

/**
 * Invented histories of an antenna with known truth: resonators side by side at one feedpoint, changed step by step,
 * swept with noise and analysed by the same code as any file. What a dip truly is, is the resonator that it stands at.
 */
export type HistoryKind = "quiet" | "coming-and-going" | "crossing" | "narrow-sweeps";
export const HISTORY_KINDS: HistoryKind[] = ["quiet", "coming-and-going", "crossing", "narrow-sweeps"];

export interface History {
  kind: HistoryKind;
  sweeps: TrailSweep[];
  /** Resonator of each dip; null where two resonators share its hollow, so that nobody can say. */
  truth: Map<string, number | null>;
}

interface Part extends Resonator {
  present: boolean;
}

export function inventHistory(kind: HistoryKind, number: number): History {
  const name = `${kind} ${number}`;
  const random = randomBy(name);
  const gauss = gaussBy(`${name} noise`);
  const between = (low: number, high: number) => low + (high - low) * random();
  const parts = inventParts(between);
  const crosser = kind === "crossing" ? addCrosser(parts, between) : null;
  const truth: History["truth"] = new Map();
  const count = Math.round(between(6, 14));
  const sweeps: TrailSweep[] = [];
  for (let i = 0; i < count; i++) {
    if (i > 0) step(parts, between, gauss, kind);
    if (i > 0 && crosser) crosser.hz *= 1 + between(0.01, 0.035) * crosser.way;
    const narrow = kind === "narrow-sweeps" && random() < 0.5;
    const startHz = narrow ? between(2e6, 9e6) : 2e6;
    const stopHz = narrow ? between(24e6, 60e6) : 64e6;
    const present = parts.filter((part) => part.present);
    const sweep = sweepOver(startHz, stopHz, Math.round(between(700, 1600)), present, gauss);
    const found = analyse(sweep, DEFAULT_SETTINGS).dips.filter((dip) => !dip.edge);
    const owners = ownersOf(found, parts);
    const dips = found.map((dip, j) => {
      const id = `${i}.${j}`;
      truth.set(id, owners[j]);
      const { frequencyHz, returnLossDb, bandwidth } = dip;
      return {
        id,
        frequencyHz,
        returnLossDb,
        widthHz: bandwidth && !bandwidth.open ? bandwidth.widthHz : null,
      };
    });
    sweeps.push({ id: `s${i}`, startHz, stopHz, dips });
  }
  return { kind, sweeps, truth };
}

/** Three to seven resonators between 3 and 58 MHz, no two closer than 12 % at the start. */
function inventParts(between: (low: number, high: number) => number): Part[] {
  const wanted = Math.round(between(3, 7));
  const parts: Part[] = [];
  for (let tries = 0; parts.length < wanted && tries < 200; tries++) {
    const hz = Math.exp(between(Math.log(3e6), Math.log(58e6)));
    if (parts.some((part) => Math.abs(Math.log(part.hz / hz)) < 0.12)) continue;
    parts.push({ hz, ohm: between(22, 110), q: between(9, 40), present: true });
  }
  return parts;
}

/** A resonator that walks across another one of them, step by step: something that another part of the antenna does not move. */
function addCrosser(parts: Part[], between: (low: number, high: number) => number): Part & { way: number } {
  const target = parts[Math.floor(between(0, parts.length - 1e-9))];
  const way = between(0, 1) < 0.5 ? 1 : -1;
  const hz = target.hz * (1 - way * between(0.05, 0.1));
  const crosser = { hz, ohm: between(22, 110), q: between(9, 40), present: true, way };
  parts.push(crosser);
  return crosser;
}

/** One change: a length (mostly a few per cent), which pulls the others a little; heights and losses drift. */
function step(
  parts: Part[],
  between: (low: number, high: number) => number,
  gauss: () => number,
  kind: HistoryKind,
): void {
  const changed = Math.floor(between(0, parts.length - 1e-9));
  const move = Math.sign(between(-1, 1)) * Math.exp(between(Math.log(0.003), Math.log(0.08)));
  for (const [i, part] of parts.entries()) {
    part.hz *= 1 + (i === changed ? move : move * between(-0.05, 0.1)) + 0.001 * gauss();
    part.ohm *= Math.exp((i === changed ? 0.2 : 0.05) * gauss());
    part.q *= Math.exp((i === changed ? 0.08 : 0.03) * gauss());
    if (kind === "coming-and-going" && between(0, 1) < 0.1) part.present = !part.present;
  }
}

function sweepOver(
  startHz: number,
  stopHz: number,
  points: number,
  parts: Resonator[],
  gauss: () => number,
): Sweep {
  const gamma: (hz: number) => Complex = reflection(
    parts,
    NO_FEEDLINE,
    { noise: 0.002, directivity: 0.01 },
    gauss,
  );
  const frequencyHz = Float64Array.from(
    { length: points },
    (_, i) => startHz + ((stopHz - startHz) * i) / (points - 1),
  );
  const magnitude = Float64Array.from(frequencyHz, (hz) => {
    const { re, im } = gamma(hz);
    return Math.hypot(re, im);
  });
  return { frequencyHz, magnitude, referenceOhm: 50, plane: "port" };
}

/** The resonator of each dip, by least total distance; null where its neighbour is nearly as near. */
function ownersOf(dips: readonly Dip[], parts: Part[]): (number | null)[] {
  const present = parts.flatMap((part, index) => (part.present ? [{ hz: part.hz, index }] : []));
  const distance = (dip: Dip, hz: number) => Math.abs(Math.log(dip.frequencyHz / hz));
  const cost = dips.map((dip) => [...present.map(({ hz }) => distance(dip, hz)), ...dips.map(() => STRAY)]);
  return assign(cost).map((j, i) => {
    if (j >= present.length) return null;
    const own = distance(dips[i], present[j].hz);
    const others = present.filter((_, k) => k !== j).map(({ hz }) => distance(dips[i], hz));
    return Math.min(...others) < CLEAR * own + CLOSE ? null : present[j].index;
  });
}

/** A dip farther than this (ln f) from every resonator belongs to none of them. */
const STRAY = 0.06;
/** Its own resonator is to be this many times nearer than any other, and the other at least `CLOSE` (ln f) away. */
const CLEAR = 2;
const CLOSE = 0.005;
