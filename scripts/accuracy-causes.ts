import { readdirSync, readFileSync } from "node:fs";
import { analyse } from "../app/measurement/analyse.ts";
import type { Antenna, AntennaElement, ElementKind } from "../app/measurement/antenna.ts";
import type { Cause } from "../app/measurement/causes/cause.ts";
import { causesOf } from "../app/measurement/causes.ts";
import { SPEED_OF_LIGHT } from "../app/measurement/feedline.ts";
import type { Sweep } from "../app/measurement/sweep.ts";

/**
 * How often the causes of a dip hold its true origin, on the NEC-2 models of tests/fixtures/nec (made by
 * tests/reference/nec_causes.py). Each antenna also has parts that stand in no model and so can't be the
 * origin of anything: they make the list as long as a real one.
 */
export interface CauseRow {
  model: string;
  frequencyHz: number;
  swr: number;
  /** Keys of the parts whose removal takes the dip away. */
  origin: string[];
  /** Its place in the list, from 1; null where the list lacks it. */
  place: number | null;
  offered: string[];
  /** Share of blind choices of three of the antenna's parts that would hold it. */
  blind: number;
}

interface Model {
  name: string;
  lowestMhz: number;
  elements: {
    key: string;
    kind: ElementKind | "feedline";
    lengthM: number;
    count: number;
    heightM: number | null;
    where: string;
  }[];
  dips: { mhz: number; swr: number; origin: string[] }[];
}

export function causeRows(): CauseRow[] {
  return modelNames().flatMap((name, i) => rowsOf(modelNamed(name), i));
}

export function totalsOf(rows: readonly CauseRow[]) {
  const share = (right: (row: CauseRow) => boolean) => rows.filter(right).length / rows.length;
  const within = (row: CauseRow, n: number) => row.place !== null && row.place <= n;
  const parasites = rows.filter((row) => !row.origin.some((key) => FED.includes(key)));
  return {
    models: new Set(rows.map(({ model }) => model)).size,
    dips: rows.length,
    first: share((row) => within(row, 1)),
    firstThree: share((row) => within(row, 3)),
    blindThree: rows.reduce((sum, { blind }) => sum + blind, 0) / rows.length,
    ofOtherParts: parasites.length,
    ofOtherPartsFirstThree: parasites.filter((row) => within(row, 3)).length / parasites.length,
  };
}

/** `npm run accuracy -- causes [--json]`; exit code 1 where the goal is missed. */
export function printCauses(json: boolean): number {
  const rows = causeRows();
  for (const row of rows) process.stdout.write(`${json ? JSON.stringify(row) : lineOf(row)}\n`);
  const total = totalsOf(rows);
  const percent = (share: number) => `${(100 * share).toFixed(1)} %`;
  const text = `of ${total.dips} dips of ${total.models} antennas: origin first ${percent(total.first)}, among the first three ${percent(total.firstThree)} (goal ${percent(GOAL)}; three parts chosen blindly ${percent(total.blindThree)}); of the ${total.ofOtherParts} dips of parts that are not fed ${percent(total.ofOtherPartsFirstThree)}`;
  process.stdout.write(`${json ? JSON.stringify({ total, goal: GOAL }) : text}\n`);
  const trims = trimRows();
  for (const row of trims) process.stdout.write(`${json ? JSON.stringify(row) : trimLine(row)}\n`);
  return total.firstThree >= GOAL && trims.every(({ worst }) => worst[2] <= TRIM_GOAL) ? 0 : 1;
}

export interface TrimRow {
  model: string;
  part: string;
  wantedMhz: number;
  /** Furthest from the wanted frequency over ±1, 2 and 5 % of length: as found, after one round, after two. */
  worst: number[];
}

/** How far trimmed lengths end from the wanted frequency; solved round by round when the fixtures were made. */
export function trimRows(): TrimRow[] {
  const all: { model: string; part: string; wantedMhz: number; rounds: { pairs: [number, number][] }[] }[] =
    JSON.parse(readFileSync(`${FIXTURES}trims.json`, "utf8"));
  return all.map(({ model, part, wantedMhz, rounds }) => ({
    model,
    part,
    wantedMhz,
    worst: [0, 1, 2].map((turn) =>
      Math.max(...rounds.map(({ pairs }) => Math.abs(pairs[turn][1] / wantedMhz - 1))),
    ),
  }));
}

function trimLine({ model, part, wantedMhz, worst }: TrimRow): string {
  const [found, one, two] = worst.map((share) => `${(100 * share).toFixed(3)} %`);
  return `${model.padEnd(22)}  ${part.padEnd(9)}  wanted ${wantedMhz.toFixed(3)} MHz: off by up to ${found}, after one trim ${one}, after two ${two}`;
}

function rowsOf(model: Model, at: number): CauseRow[] {
  const dips = analyse(sweepOf(model.name)).dips.filter(({ edge }) => !edge);
  const antenna = antennaOf(model, at);
  const feedlineM = antenna.feedline?.lengthM ?? 0;
  const context = {
    antenna,
    dips,
    ripplePeriodHz: (0.66 * SPEED_OF_LIGHT) / (2 * feedlineM),
    references: [],
  };
  const parts = antenna.elements.length + 1;
  return model.dips.map(({ mhz, swr, origin }) => {
    const hz = mhz * 1e6;
    const dip = dips.toSorted((a, b) => Math.abs(a.frequencyHz - hz) - Math.abs(b.frequencyHz - hz))[0];
    const found = dip && Math.abs(dip.frequencyHz / hz - 1) < SAME ? causesOf(dip, context) : [];
    const place = found.findIndex((cause) => cause.part !== null && origin.includes(cause.part));
    return {
      model: model.name,
      frequencyHz: hz,
      swr,
      origin,
      place: place < 0 ? null : place + 1,
      offered: found.map(briefly),
      blind: 1 - missed(parts, origin.length),
    };
  });
}

/** The chance that three different parts of `parts` hold none of `right`. */
function missed(parts: number, right: number): number {
  return [0, 1, 2].reduce((p, i) => p * Math.max(0, (parts - right - i) / (parts - i)), 1);
}

function briefly(cause: Cause): string {
  const z = (cause.offsetHz / cause.toleranceHz).toFixed(2);
  return `${cause.part ?? cause.kind}${cause.order === null ? "" : `×${cause.order}`} ${z}`;
}

/** The model's parts, a mast, guys and a feedline that the model lacks. */
function antennaOf(model: Model, at: number): Antenna {
  const part = (key: string, kind: ElementKind, lengthM: number, count = 1): AntennaElement => ({
    ...{ key, kind, name: `${kind} ${key}`, lengthM, count },
    ...{ heightM: null, diameterMm: null, material: "", insulated: null, where: "" },
  });
  const real = model.elements.filter(({ kind }) => kind !== "feedline");
  const line = model.elements.find(({ kind }) => kind === "feedline");
  const scale = 14.1 / model.lowestMhz;
  const [mast, guy, wire, feedlineM] = BYSTANDERS[at % BYSTANDERS.length].map(
    (m) => Math.round(m * scale * 10) / 10,
  );
  const elements = real.map(({ key, kind, lengthM, count }) =>
    part(key, kind as ElementKind, lengthM, count),
  );
  elements.push(
    part("other-mast", "mast", mast),
    part("other-guy", "guy", guy, 2),
    part("other-wire", "wire", wire),
  );
  const feedline = { cable: null, lengthM: line?.lengthM ?? feedlineM, velocityFactor: 0.66, route: "" };
  return { elements, feedline, choke: null, ground: "", remarks: "" };
}

function modelNames(): string[] {
  return readdirSync(FIXTURES)
    .filter((name) => name.endsWith(".json") && name !== "trims.json")
    .map((name) => name.slice(0, -5))
    .sort();
}

function modelNamed(name: string): Model {
  return JSON.parse(readFileSync(`${FIXTURES}${name}.json`, "utf8"));
}

/** First line start and step in Hz, then abs Γ in 1/100,000, each the difference to the one before. */
export function sweepOf(name: string): Sweep {
  const [head, ...steps] = readFileSync(`${FIXTURES}${name}.csv`, "utf8").trim().split("\n");
  const [startHz, stepHz] = head.split(",").map(Number);
  let sum = 0;
  return {
    frequencyHz: Float64Array.from(steps, (_, i) => startHz + i * stepHz),
    magnitude: Float64Array.from(steps, (step) => {
      sum += Number(step);
      return sum / 1e5;
    }),
    referenceOhm: 50,
    plane: "antenna",
  };
}

function lineOf(row: CauseRow): string {
  return [
    row.model.padEnd(22),
    `${(row.frequencyHz / 1e6).toFixed(3).padStart(8)} MHz`,
    `SWR ${row.swr.toFixed(2)}`,
    row.origin.join("+").padEnd(9),
    row.place === null ? "not in the list" : `place ${row.place}`,
    row.offered.slice(0, 4).join(", "),
  ].join("  ");
}

const FIXTURES = new URL("../tests/fixtures/nec/", import.meta.url).pathname;
/** The issue's: among the first three in 80 % of the dips. */
const GOAL = 0.8;
/** The issue's: within 0.3 % after at most two rounds. */
const TRIM_GOAL = 0.003;
/** Own search and the app's find a dip within this share of each other. */
const SAME = 0.004;
/** Keys of the models' parts that carry the feed. */
const FED = ["v", "d", "l", "a", "r"];
/** Mast, guy, wire and feedline, metres for a lowest design frequency of 14.1 MHz; invented. */
const BYSTANDERS = [
  [6.3, 4.1, 7.7, 15],
  [8.2, 3.2, 5.9, 22],
  [4.4, 5.6, 9.3, 18],
  [7.1, 2.7, 11.2, 12],
  [5.2, 6.4, 8.4, 27],
];
