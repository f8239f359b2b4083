import { comma, type Fixture, fixture, lines } from "./fixture.ts";
import { HF, type Point, s11Db, swr, TOPBAND, UHF, VHF } from "./model.ts";

const plainRows = (p: Point[]) => p.map((q) => `${q.mhz.toFixed(4)},${s11Db(q).toFixed(3)}`);

/** A fixed order that looks like none: multiples of a step that shares no factor with the count. */
function shuffled<T>(all: T[]): T[] {
  return all.map((_, i) => all[(i * 89 + 17) % all.length]);
}

/** Troubles of layout: what stands around, between and in place of the rows. */
export const LAYOUT: Fixture[] = [
  fixture(
    "long-preamble.csv",
    "Three hundred lines of comment before the table.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        ...Array.from({ length: 300 }, (_, i) => `# setting ${i + 1}: value ${(i * 37) % 101}, range ${i}`),
        "Frequency (MHz),S11 (dB)",
        ...plainRows(p),
      ]),
  ),
  fixture(
    "start-stop-preamble.csv",
    "The unit stands only in the preamble's start and stop.",
    { model: UHF, quantity: "swr" },
    (p) =>
      lines([
        "Station,bench three",
        "Start,410.0 MHz",
        "Stop,460.0 MHz",
        "Points,126",
        "",
        "Freq,SWR",
        ...p.map((q) => `${q.mhz.toFixed(1)},${swr(q).toFixed(4)}`),
      ]),
  ),
  fixture("bare-hz-s11.csv", "No heading: hertz and S11.", { model: HF, quantity: "s11-db" }, (p) =>
    lines(p.map((q) => `${(q.mhz * 1e6).toFixed(0)},${s11Db(q).toFixed(4)}`)),
  ),
  fixture("bare-mhz-swr.tsv", "No heading: megahertz and SWR.", { model: VHF, quantity: "swr" }, (p) =>
    lines(p.map((q) => `${q.mhz.toFixed(3)}\t${swr(q).toFixed(3)}`)),
  ),
  fixture(
    "bare-mhz-loss.txt",
    "No heading: megahertz and positive return loss.",
    { model: VHF, quantity: "return-loss" },
    (p) => lines(p.map((q) => `${q.mhz.toFixed(3)} ${(-s11Db(q)).toFixed(3)}`)),
  ),
  fixture("descending.csv", "Frequencies run downwards.", { model: VHF, quantity: "s11-db" }, (p) =>
    lines(["Frequency (MHz),S11 (dB)", ...plainRows(p).reverse()]),
  ),
  fixture("unsorted.csv", "Frequencies in no order.", { model: VHF, quantity: "s11-db" }, (p) =>
    lines(["Frequency (MHz),S11 (dB)", ...shuffled(plainRows(p))]),
  ),
  fixture("repeated.csv", "Every tenth frequency twice.", { model: VHF, quantity: "s11-db" }, (p) =>
    lines([
      "Frequency (MHz),S11 (dB)",
      ...plainRows(p).flatMap((row, i) => (i % 10 === 5 ? [row, row] : [row])),
    ]),
  ),
  fixture("gaps.csv", "Values missing in several ways.", { model: HF, quantity: "s11-db" }, (p) =>
    lines([
      "Frequency (MHz),S11 (dB)",
      ...p.map(
        (q, i) =>
          `${q.mhz.toFixed(4)},${i < 12 ? ["NaN", "---", "", "n/a", "OL", "#N/A"][i % 6] : s11Db(q).toFixed(3)}`,
      ),
    ]),
  ),
  fixture(
    "lost-frequencies.csv",
    "Rows whose frequency is missing.",
    { model: VHF, quantity: "s11-db", points: 149 },
    (p) =>
      lines([
        "Frequency (MHz),S11 (dB)",
        ...plainRows(p).map((row, i) => (i === 3 || i === 140 ? row.replace(/^[^,]*/, "") : row)),
      ]),
  ),
  fixture(
    "index-first.csv",
    "A column of counting numbers before the frequency.",
    { model: VHF, quantity: "swr" },
    (p) => lines(["No;MHz;SWR", ...p.map((q, i) => `${i + 1};${comma(q.mhz, 3)};${comma(swr(q), 3)}`)]),
  ),
  fixture(
    "bare-index.csv",
    "Counting numbers, frequency and S11 without any heading.",
    { model: HF, quantity: "s11-db" },
    (p) => lines(p.map((q, i) => `${i},${(q.mhz * 1e6).toFixed(0)},${s11Db(q).toFixed(4)}`)),
  ),
  fixture(
    "date-time.csv",
    "Date and time of day before the frequency.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "Date,Time,Frequency (MHz),S11 (dB)",
        ...p.map(
          (q, i) =>
            `2031-05-04,10:${String(i % 60).padStart(2, "0")}:07,${q.mhz.toFixed(3)},${s11Db(q).toFixed(3)}`,
        ),
      ]),
  ),
  fixture("footer.csv", "Statistics under the table.", { model: VHF, quantity: "s11-db" }, (p) =>
    lines([
      "Frequenz (MHz);S11 (dB)",
      ...p.map((q) => `${comma(q.mhz, 3)};${comma(s11Db(q), 3)}`),
      "",
      "Minimum;145,20;-17,3",
      "Mittelwert;;-3,1",
      "Ende der Messung",
    ]),
  ),
  fixture(
    "two-blocks.csv",
    "A second sweep under the first, with its own heading.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "Sweep 1",
        "Frequency (MHz),S11 (dB)",
        ...plainRows(p),
        "",
        "Sweep 2",
        "Frequency (MHz),S11 (dB)",
        ...p.map((q) => `${q.mhz.toFixed(4)},${(0.9 * s11Db(q) - 0.1).toFixed(3)}`),
      ]),
  ),
  fixture(
    "restart.txt",
    "A second sweep follows after an empty line without a heading.",
    { model: VHF, quantity: "swr" },
    (p) =>
      lines([
        "# MHz SWR",
        ...p.map((q) => `${q.mhz.toFixed(2)} ${swr(q).toFixed(3)}`),
        "",
        "",
        ...p.map((q) => `${q.mhz.toFixed(2)} ${(1.2 * swr(q)).toFixed(3)}`),
      ]),
  ),
  fixture(
    "trailing-delimiter.csv",
    "A delimiter at the end of every line.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines(["Frequency (MHz);S11 (dB);", ...p.map((q) => `${q.mhz.toFixed(3)};${s11Db(q).toFixed(3)};`)]),
  ),
  fixture(
    "blank-lines.csv",
    "Empty lines between the rows, an END at the end.",
    { model: VHF, quantity: "s11-db" },
    (p) =>
      lines([
        "",
        "Frequency (MHz),S11 (dB)",
        "",
        ...plainRows(p).flatMap((row, i) => (i % 7 === 0 ? [row, ""] : [row])),
        "END",
        "",
      ]),
  ),
  fixture(
    "comment-heading.txt",
    "Heading in a comment, comments between the rows.",
    { model: TOPBAND, quantity: "swr" },
    (p) =>
      lines([
        "% sweep of a wire",
        "% f/kHz   SWR",
        ...p.flatMap((q, i) => [
          ...(i % 50 === 20 ? ["% point checked"] : []),
          `${(q.mhz * 1e3).toFixed(1)}   ${swr(q).toFixed(3)}`,
        ]),
      ]),
  ),
  fixture(
    "heading-newline.csv",
    "A quoted heading that holds a line end.",
    { model: VHF, quantity: "swr" },
    (p) =>
      lines([
        '"Frequency',
        '(MHz)","Standing',
        'wave ratio"',
        ...p.map((q) => `${q.mhz.toFixed(3)},${swr(q).toFixed(3)}`),
      ]),
  ),
  fixture(
    "cut-off.csv",
    "The file ends in the middle of its last line.",
    { model: { ...VHF, stopMhz: 159.8, points: 150 }, quantity: "s11-db" },
    (p) => `${lines(["Frequency (MHz),S11 (dB)", ...plainRows(p)])}16`,
  ),
];
