import type { Lines } from "../lines.ts";
import { fail } from "../problem.ts";
import type { TextSpec } from "../reading.ts";
import { type Rows, readRows } from "./rows.ts";
import { lineKind, type Segment } from "./segments.ts";
import type { Table } from "./table.ts";

export interface Stretch {
  rows: Rows;
  /** Tables of the file to choose from, the one that was read among them. */
  blocks: Segment[];
  assumed: string[];
}

/** A restart counts as a second sweep only if both sides have this share of all rows. */
const LEAST_SWEEP_SHARE = 0.2;
const LEAST_SWEEP_ROWS = 5;

/**
 * Reads the rows of the chosen table: goes on behind a stray line of text where the frequencies go on, and stops where
 * they start anew (a second sweep under the first). Fails with "not-a-sweep" where fewer than two rows remain.
 */
export function joinAndCut(lines: Lines, table: Table, spec: TextSpec): Stretch {
  const { dialect, block } = table;
  const assumed: string[] = [];
  const rows = readRows(lines, [block], dialect, spec);
  for (const next of table.blocks) {
    if (next.firstLine <= block.lastLine) continue;
    const more = readRows(lines, [next], dialect, spec);
    if (!continues(rows, more)) break;
    appendRows(rows, more);
    assumed.push(
      `The table goes on behind text above line ${next.firstLine}; both parts were read as one sweep.`,
    );
  }
  const starts = restarts(rows);
  let blocks = table.blocks;
  if (starts.length > 0) {
    const all = [0, ...starts];
    const parts = all.map((from, k) => {
      const to = all[k + 1] ?? rows.count;
      return { firstLine: rows.line[from], lastLine: rows.line[to - 1], rows: to - from };
    });
    blocks = [
      ...blocks.filter((b) => b.lastLine < block.firstLine || b.firstLine > block.lastLine),
      ...parts,
    ];
    blocks.sort((a, b) => a.firstLine - b.firstLine);
    rows.count = starts[0];
  }
  const later = blocks.filter((b) => b.firstLine > rows.line[Math.max(rows.count - 1, 0)]);
  if (later.length > 0)
    assumed.push(
      `The file holds ${later.length + 1} sweeps one under the other: the one from line ${block.firstLine} was read, not ${later.length === 1 ? "that" : "those"} from line ${later
        .map((b) => b.firstLine)
        .slice(0, 5)
        .join(", ")}.`,
    );
  const below = textBelow(lines, table, rows);
  if (below !== null && later.length === 0)
    assumed.push(`The text from line ${below} on, under the table, was passed over.`);
  if (rows.count < 2)
    fail(
      "not-a-sweep",
      `Expected at least two rows with a frequency and a value from line ${block.firstLine} on, found ${rows.count}.`,
      block.firstLine,
    );
  return { rows, blocks, assumed };
}

/** First line under the table that is neither blank nor comment; null where there is none. */
function textBelow(lines: Lines, { dialect }: Table, rows: Rows): number | null {
  for (let n = (rows.line[rows.count - 1] ?? lines.count) + 1; n <= lines.count; n++) {
    const kind = lineKind(lines.text(n), dialect);
    if (kind !== "blank" && kind !== "comment") return n;
  }
  return null;
}

function continues(rows: Rows, more: Rows): boolean {
  if (rows.count < 2 || more.count < 1) return false;
  const last = rows.frequency[rows.count - 1];
  const up = last >= rows.frequency[0];
  return up ? more.frequency[0] > last : more.frequency[0] < last;
}

function appendRows(rows: Rows, more: Rows): void {
  const total = rows.count + more.count;
  const grown = <T extends Float64Array | Uint32Array>(a: T, b: T, make: (n: number) => T): T => {
    const out = make(total);
    out.set(a.subarray(0, rows.count) as never);
    out.set(b.subarray(0, more.count) as never, rows.count);
    return out;
  };
  rows.frequency = grown(rows.frequency, more.frequency, (n) => new Float64Array(n));
  rows.value = grown(rows.value, more.value, (n) => new Float64Array(n));
  if (rows.second.length > 0) rows.second = grown(rows.second, more.second, (n) => new Float64Array(n));
  rows.line = grown(rows.line, more.line, (n) => new Uint32Array(n));
  rows.gaps += more.gaps;
  rows.limits += more.limits;
  rows.withoutFrequency.push(...more.withoutFrequency);
  rows.skipped.push(...more.skipped);
  rows.count = total;
}

/** Rows at which the frequencies jump back to where they began, after having gone one way. */
function restarts({ frequency, count }: Rows): number[] {
  const first = frequency[0];
  const up = frequency[Math.min(1, count - 1)] >= first;
  const found: number[] = [];
  let from = 0;
  for (let i = 1; i < count; i++) {
    const back = up ? frequency[i] < frequency[i - 1] : frequency[i] > frequency[i - 1];
    if (!back) continue;
    const span = Math.abs(frequency[i - 1] - frequency[from]);
    if (Math.abs(frequency[i - 1] - frequency[i]) < 0.5 * span || i - from < LEAST_SWEEP_ROWS) return [];
    if (i - from < count * LEAST_SWEEP_SHARE) return [];
    found.push(i);
    from = i;
  }
  return found.length > 0 && count - from >= Math.max(LEAST_SWEEP_ROWS, found[0] * LEAST_SWEEP_SHARE)
    ? found
    : [];
}
