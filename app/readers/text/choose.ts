import type { Quantity } from "../../measurement/sweep.ts";
import { fail } from "../problem.ts";
import type { TextQuantity, TextSpec } from "../reading.ts";
import type { Candidate } from "./candidates.ts";
import type { Column } from "./columns.ts";

/** What a text file's quantity is called outside the reader. */
export const COARSE: Record<TextQuantity, Quantity> = {
  "s11-db": "s11-db",
  "return-loss": "return-loss",
  swr: "swr",
  level: "level",
  magnitude: "gamma",
  "magnitude-angle": "gamma",
  "db-angle": "gamma",
  "real-imaginary": "gamma",
  "resistance-reactance": "impedance",
  "impedance-angle": "impedance",
};

/** Quantities that take two columns. */
export const TWO_COLUMNS: ReadonlySet<TextQuantity> = new Set([
  "magnitude-angle",
  "db-angle",
  "real-imaginary",
  "resistance-reactance",
  "impedance-angle",
]);

/**
 * Takes the best candidate that agrees with what is given; where none does, builds the reading that was asked for.
 * Fails with "no-such-column" and "no-value-column".
 */
export function choose(
  candidates: Candidate[],
  columns: Column[],
  frequency: number,
  asked: Partial<TextSpec>,
  wanted?: Quantity,
): Candidate {
  const given = { ...asked };
  for (const index of [given.valueColumn, given.secondColumn, given.frequencyColumn])
    if (typeof index === "number" && !(index >= 0 && index < columns.length))
      fail("no-such-column", `The table has ${columns.length} columns; column ${index + 1} was asked for.`);
  const agreeing = candidates.filter(
    (c) =>
      (given.valueColumn === undefined || c.valueColumn === given.valueColumn) &&
      (given.secondColumn === undefined || c.secondColumn === given.secondColumn) &&
      (given.quantity === undefined || c.quantity === given.quantity) &&
      (given.quantity !== undefined || wanted === undefined || COARSE[c.quantity] === wanted),
  );
  if (agreeing.length === 0 && wanted !== undefined) given.quantity ??= plainest(wanted, columns.length);
  const chosen = agreeing[0] ?? built(candidates, columns, frequency, given);
  return {
    ...chosen,
    frequencyColumn: given.frequencyColumn ?? chosen.frequencyColumn,
    angleUnit: given.angleUnit ?? chosen.angleUnit,
  };
}

/** The reading of a quantity that is tried where no column offers it. */
function plainest(wanted: Quantity, columns: number): TextQuantity {
  if (wanted === "impedance") return "resistance-reactance";
  if (wanted === "gamma") return columns > 2 ? "real-imaginary" : "magnitude";
  return wanted;
}

function built(
  candidates: Candidate[],
  columns: Column[],
  frequency: number,
  given: Partial<TextSpec>,
): Candidate {
  const frequencyColumn = given.frequencyColumn ?? frequency;
  const free = columns.filter((c) => c.index !== frequencyColumn && c.filled > 0).map((c) => c.index);
  const valueColumn = given.valueColumn ?? candidates[0]?.valueColumn ?? free[0];
  if (valueColumn === undefined || (given.quantity === undefined && given.valueColumn === undefined))
    return fail(
      "no-value-column",
      "No column holds a return loss, an SWR, a level or another form of reflection.",
    );
  const quantity = given.quantity ?? (given.secondColumn ? "real-imaginary" : "s11-db");
  let secondColumn: number | null = null;
  if (TWO_COLUMNS.has(quantity)) {
    const paired = candidates.find(
      (c) => c.valueColumn === valueColumn && c.secondColumn !== null,
    )?.secondColumn;
    secondColumn = given.secondColumn ?? paired ?? free.find((c) => c > valueColumn) ?? null;
    if (secondColumn === null || secondColumn === valueColumn)
      return fail(
        "no-such-column",
        `A reading as ${quantity} takes two columns; the table has only one to offer.`,
      );
  }
  return {
    frequencyColumn,
    valueColumn,
    secondColumn,
    quantity,
    angleUnit: "deg",
    worth: 0,
    confidence: 0.9,
    assumed: [],
    label: columns[valueColumn].heading.text || `column ${valueColumn + 1}`,
  };
}
