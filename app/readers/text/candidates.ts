import type { TextQuantity } from "../reading.ts";
import type { Column } from "./columns.ts";
import { isCounter } from "./frequency.ts";
import { type Held, type Hints, kindOf } from "./kinds.ts";

/** One way to read a reflection from the table's columns. */
export interface Candidate {
  frequencyColumn: number;
  valueColumn: number;
  secondColumn: number | null;
  quantity: TextQuantity;
  angleUnit: "deg" | "rad";
  /** Larger is more informative. */
  worth: number;
  confidence: number;
  assumed: string[];
  label: string;
}

/** Complex before scalar; among them the form that needs the fewest assumptions first. */
const WORTH: Record<TextQuantity, number> = {
  "real-imaginary": 100,
  "magnitude-angle": 95,
  "db-angle": 94,
  "resistance-reactance": 92,
  "impedance-angle": 90,
  "s11-db": 70,
  "return-loss": 69,
  magnitude: 65,
  swr: 60,
  level: 40,
};
/** A second or third port's reflection stands behind the first's, a transmission behind all. */
const OTHER_PORT_COST = 35;
const TRANSMISSION_COST = 60;

/**
 * Lists the ways to read the columns, best first. `frequencies`: the columns that hold frequencies;
 * each value belongs to the nearest of them on its left.
 */
export function findCandidates(
  columns: Column[],
  frequencies: number[],
  hints: Omit<Hints, "phase">,
): Candidate[] {
  const held = columns
    .filter((c) => !frequencies.includes(c.index) && !(c.heading.role === "unknown" && isCounter(c)))
    .map((c) => kindOf(c, { ...hints, phase: columns.some((other) => other.heading.role === "angle") }));
  const pairs = [...headedPairs(held), ...unheadedPairs(held)];
  const singles: Pair[] = [];
  for (const h of held)
    if (isSingle(h)) singles.push({ value: h, second: null, quantity: h.kind as TextQuantity });
  return [...pairs, ...singles]
    .map((pair) => candidate(pair, frequencies))
    .sort((a, b) => b.worth - a.worth || a.valueColumn - b.valueColumn);
}

const ANGLED: ReadonlySet<TextQuantity> = new Set(["magnitude-angle", "db-angle", "impedance-angle"]);

interface Pair {
  value: Held;
  second: Held | null;
  quantity: TextQuantity;
  assumed?: string;
  confidence?: number;
}

function isSingle({ kind }: Held): boolean {
  return (
    kind === "s11-db" || kind === "return-loss" || kind === "swr" || kind === "level" || kind === "magnitude"
  );
}

function headedPairs(held: Held[]): Pair[] {
  const pairs: Pair[] = [];
  for (const [i, h] of held.entries()) {
    if (h.kind === "real") {
      const second = partner(held, i, "imaginary");
      if (second) pairs.push(cartesian(h, second));
    }
    if (h.kind === "resistance") {
      const second = partner(held, i, "reactance");
      if (second) pairs.push({ value: h, second, quantity: "resistance-reactance" });
    }
    if (h.kind === "angle") {
      const value = angled(held, i);
      if (value) pairs.push({ value, second: h, quantity: polar(value) });
    }
  }
  return pairs;
}

/** Real and imaginary parts that exceed what a reflection can be are those of an impedance. */
function cartesian(value: Held, second: Held): Pair {
  const largest = Math.max(
    ...[value, second].flatMap(({ column: c }) => [Math.abs(c.minimum), Math.abs(c.maximum)]),
  );
  if (largest <= 1.5) return { value, second, quantity: "real-imaginary" };
  return {
    value,
    second,
    quantity: "resistance-reactance",
    assumed: `Real and imaginary parts up to ${largest} can't be those of Γ: taken as resistance and reactance in ohm.`,
    confidence: 0.7,
  };
}

function polar(value: Held): TextQuantity {
  if (value.kind === "impedance") return "impedance-angle";
  return value.kind === "magnitude" ? "magnitude-angle" : "db-angle";
}

function partner(held: Held[], from: number, kind: Held["kind"]): Held | undefined {
  const same = (h: Held) =>
    h.kind === kind && h.column.heading.parameter === held[from].column.heading.parameter;
  return (
    held.slice(from + 1).find(same) ?? held.find(same) ?? held.slice(from + 1).find((h) => h.kind === kind)
  );
}

/** The magnitude that an angle belongs to: same parameter where named, else the nearest on its left. */
function angled(held: Held[], from: number): Held | undefined {
  const { parameter } = held[from].column.heading;
  const able = (h: Held) => {
    const own = h.column.heading.parameter;
    if (h.kind === "impedance") return parameter === null || parameter === "z";
    if (h.kind !== "magnitude" && h.kind !== "s11-db" && h.kind !== "return-loss") return false;
    return parameter === null || own === null || parameter === own;
  };
  return held.slice(0, from).reverse().find(able) ?? held.slice(from + 1).find(able);
}

/** Neighbours without a telling heading: their ranges may still show a complex reflection or an impedance. */
function unheadedPairs(held: Held[]): Pair[] {
  const pairs: Pair[] = [];
  for (let i = 0; i + 1 < held.length; i++) {
    const [a, b] = [held[i], held[i + 1]];
    if (a.column.heading.role !== "unknown" || b.column.heading.role !== "unknown") continue;
    const quantity = pairFromValues(a.column, b.column);
    if (!quantity) continue;
    const where = `Columns ${a.column.index + 1} and ${b.column.index + 1}`;
    pairs.push({
      value: a,
      second: b,
      quantity,
      assumed: `${where} have no heading that says what they hold: taken as ${PAIR_WORDS[quantity] ?? quantity} from their ranges.`,
      confidence: 0.5,
    });
  }
  return pairs;
}

const PAIR_WORDS: Partial<Record<TextQuantity, string>> = {
  "real-imaginary": "real and imaginary part of Γ",
  "magnitude-angle": "magnitude and angle of Γ",
  "db-angle": "S11 in dB and angle",
  "resistance-reactance": "resistance and reactance in ohm",
  "impedance-angle": "impedance and angle",
};

function pairFromValues(a: Column, b: Column): TextQuantity | null {
  const reach = (c: Column) => Math.max(Math.abs(c.minimum), Math.abs(c.maximum));
  const angle = b.minimum >= -180.5 && b.maximum <= 360.5 && reach(b) > 20 && b.minimum < 0;
  if (reach(a) <= 1.1 && reach(b) <= 1.1 && (a.minimum < 0 || b.minimum < 0)) return "real-imaginary";
  if (a.minimum >= 0 && a.maximum <= 1.1 && angle) return "magnitude-angle";
  if (a.maximum <= 0.5 && a.minimum < -3 && angle && b.maximum > 0) return "db-angle";
  if (a.minimum < 0 || b.minimum >= 0 || reach(a) <= 1.5) return null;
  if (b.minimum >= -90.5 && b.maximum <= 90.5 && reach(b) > 75) return "impedance-angle";
  return a.maximum > 5 ? "resistance-reactance" : null;
}

function candidate(pair: Pair, frequencies: number[]): Candidate {
  const { value, second, quantity } = pair;
  const left = frequencies.filter((c) => c < value.column.index);
  const parameter = value.column.heading.parameter;
  const port = parameter?.match(/^s(\d)(\d)$/);
  const transmission = port && port[1] !== port[2];
  const cost = transmission ? TRANSMISSION_COST : port && port[1] !== "1" ? OTHER_PORT_COST : 0;
  const texts = [value, second].map(
    (h) => h?.column.heading.text || (h ? `column ${h.column.index + 1}` : ""),
  );
  const own = pair.assumed ? [pair.assumed] : [value.assumed, second?.assumed];
  return {
    frequencyColumn: left[left.length - 1] ?? frequencies[0],
    valueColumn: value.column.index,
    secondColumn: second?.column.index ?? null,
    quantity,
    angleUnit: second && ANGLED.has(quantity) ? angleUnitOf(second.column) : "deg",
    worth: WORTH[quantity] - cost + 5 * (pair.confidence ?? value.confidence),
    confidence: pair.confidence ?? value.confidence,
    assumed: own.filter((s): s is string => typeof s === "string"),
    label: texts.filter((t) => t !== "").join(" and "),
  };
}

/** Radians where the heading says so, or where no angle leaves ±π over a sweep that turns. */
function angleUnitOf(column: Column): "deg" | "rad" {
  if (column.heading.angleUnit) return column.heading.angleUnit;
  if (column.unit === "rad") return "rad";
  const reach = Math.max(Math.abs(column.minimum), Math.abs(column.maximum));
  return column.unit === null && reach <= Math.PI + 0.001 && reach > 0.5 && !column.integers ? "rad" : "deg";
}
