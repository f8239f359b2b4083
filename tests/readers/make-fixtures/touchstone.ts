import { type Fixture, fixture, latin1, lines, withBom } from "./fixture.ts";
import { angleDeg, HF, magnitude, type Point, s11Db, UHF, VHF } from "./model.ts";

const ri = (p: Point) => `${p.re.toFixed(9)} ${p.im.toFixed(9)}`;
const ma = (p: Point) => `${magnitude(p).toFixed(9)} ${angleDeg(p).toFixed(6)}`;
const db = (p: Point) => `${s11Db(p).toFixed(8)} ${angleDeg(p).toFixed(6)}`;
const VHF75 = { ...VHF, referenceOhm: 75 };

/** A two-port of the antenna and a matched attenuator-like path, in the file's order 11, 21, 12, 22. */
const two = (p: Point) => `${ri(p)} 0.01 0.02 0.01 0.02 ${(p.re / 2).toFixed(9)} ${(p.im / 2).toFixed(9)}`;

/** Impedance of the antenna in a two-port whose ports do not couple, normalised to ohm. */
const zTwo = (p: Point, ohm: number) => `${(p.r / ohm).toFixed(9)} ${(p.x / ohm).toFixed(9)} 0 0 0 0 1 0`;

export const TOUCHSTONE: Fixture[] = [
  fixture("plain-ma.s1p", "The plainest file.", { model: HF, quantity: "gamma" }, (p) =>
    lines(["! invented", "# MHz S MA R 50", ...p.map((q) => `${q.mhz.toFixed(4)} ${ma(q)}`)]),
  ),
  fixture(
    "bare-hash.s1p",
    "Option line with nothing on it: all defaults.",
    { model: UHF, quantity: "gamma" },
    (p) => lines(["#", ...p.map((q) => `${(q.mhz / 1e3).toFixed(6)} ${ma(q)}`)]),
  ),
  fixture(
    "odd-option-order.s1p",
    "Option line out of order, in mixed case, with tabs and a comment.",
    { model: VHF75, quantity: "gamma" },
    (p) =>
      lines(
        ["  #\tR 75\tri  mHz\ts ! as it came", ...p.map((q) => `${q.mhz.toFixed(3)}\t${ri(q)} ! point`)],
        "\r\n",
      ),
  ),
  fixture(
    "db-lower.S1P",
    "Decibels, lower case, name in upper case.",
    { model: HF, quantity: "gamma" },
    (p) => lines(["# hz s db r 50", ...p.map((q) => `${(q.mhz * 1e6).toFixed(0)} ${db(q)}`)]),
  ),
  fixture(
    "z-normalised.s1p",
    "Version 1 impedances, normalised to 75 Ω.",
    { model: VHF75, quantity: "impedance" },
    (p) =>
      lines([
        "# MHz Z RI R 75",
        ...p.map((q) => `${q.mhz.toFixed(3)} ${(q.r / 75).toFixed(9)} ${(q.x / 75).toFixed(9)}`),
      ]),
  ),
  fixture(
    "y-normalised.s1p",
    "Version 1 admittances, normalised.",
    { model: VHF, quantity: "impedance" },
    (p) =>
      lines([
        "# MHz Y RI R 50",
        ...p.map(
          (q) =>
            `${q.mhz.toFixed(3)} ${((50 * q.r) / (q.r ** 2 + q.x ** 2)).toFixed(9)} ${((-50 * q.x) / (q.r ** 2 + q.x ** 2)).toFixed(9)}`,
        ),
      ]),
  ),
  fixture("two-port.s2p", "Two ports: S11 is the antenna's.", { model: VHF, quantity: "gamma" }, (p) =>
    lines(["# MHz S RI R 50", ...p.map((q) => `${q.mhz.toFixed(3)} ${two(q)}`)]),
  ),
  fixture("two-port-wrapped.s2p", "Two ports, two pairs a line.", { model: VHF, quantity: "gamma" }, (p) =>
    lines([
      "# MHz S RI R 50",
      ...p.flatMap((q) => {
        const cells = two(q).split(" ");
        return [
          `${q.mhz.toFixed(3)} ${cells.slice(0, 4).join(" ")}`,
          `  ${cells.slice(4).join(" ")} ! 12 and 22`,
        ];
      }),
    ]),
  ),
  fixture(
    "two-port-noise.s2p",
    "Noise parameters under the network data.",
    { model: VHF, quantity: "gamma" },
    (p) =>
      lines([
        "# MHz S RI R 50",
        ...p.map((q) => `${q.mhz.toFixed(3)} ${two(q)}`),
        "! noise",
        "140 0.7 0.64 69 0.38",
        "150 2.7 0.46 -33 0.4",
      ]),
  ),
  fixture(
    "two-port-z.s2p",
    "Two ports as normalised impedances.",
    { model: VHF, quantity: "impedance" },
    (p) => lines(["# MHz Z RI R 50", ...p.map((q) => `${q.mhz.toFixed(3)} ${zTwo(q, 50)}`)]),
  ),
  fixture("version-2.ts", "Version 2.0 with every keyword.", { model: VHF75, quantity: "gamma" }, (p) =>
    lines([
      "! invented",
      "[Version] 2.0",
      "# MHz S RI R 50",
      "[Number of Ports] 1",
      `[Number of Frequencies] ${p.length}`,
      "[Reference] 75",
      "[Matrix Format] Full",
      "[Begin Information]",
      "[Manufacturer] nobody",
      "[End Information]",
      "[Network Data]",
      ...p.map((q) => `${q.mhz.toFixed(3)} ${ri(q)}`),
      "[End]",
    ]),
  ),
  fixture(
    "version-2-z-ohm.ts",
    "Version 2.1 impedances, in ohm.",
    { model: VHF75, quantity: "impedance" },
    (p) =>
      lines([
        "[version] 2.1",
        "# MHz Z RI",
        "[number of ports] 1",
        `[number of frequencies] ${p.length}`,
        "[reference]",
        "75",
        "[network data]",
        ...p.map((q) => `${q.mhz.toFixed(3)} ${q.r.toFixed(7)} ${q.x.toFixed(7)}`),
        "[end]",
      ]),
  ),
  fixture(
    "version-2-lower.s2p",
    "Version 2.0, two ports, lower triangle, reference on its own line, noise.",
    { model: VHF, quantity: "gamma" },
    (p) =>
      lines([
        "[Version] 2.0",
        "# MHz S RI R 75",
        "[Number of Ports] 2",
        "[Two-Port Data Order] 12_21",
        `[Number of Frequencies] ${p.length}`,
        "[Number of Noise Frequencies] 1",
        "[Reference]",
        "50 25",
        "[Matrix Format] Lower",
        "[Network Data]",
        ...p.flatMap((q) => [`${q.mhz.toFixed(3)} ${ri(q)}`, `0.01 0.02 ${(q.re / 3).toFixed(9)} 0`]),
        "[Noise Data]",
        "140 0.7 0.64 69 19",
        "[End]",
      ]),
  ),
  fixture(
    "block-head.s1p",
    "Wrapped as an instrument sends it: BEGIN, a block head, END.",
    { model: HF, quantity: "gamma" },
    (p) => {
      const body = lines(
        [
          "! sent by an instrument",
          "# Hz S MA R 50",
          ...p.map((q) => `${(q.mhz * 1e6).toFixed(0)} ${ma(q)}`),
        ],
        "\r\n",
      );
      return `BEGIN\r\n#5${String(body.length).padStart(5, "0")}${body}END\r\n`;
    },
  ),
  fixture("bom.s1p", "UTF-8 with byte order mark.", { model: HF, quantity: "gamma", encode: withBom }, (p) =>
    lines(["! dipôle", "# MHz S RI R 50", ...p.map((q) => `${q.mhz.toFixed(4)} ${ri(q)}`)]),
  ),
  fixture(
    "latin1-cr.s1p",
    "Latin-1 comment, carriage returns alone.",
    { model: HF, quantity: "gamma", encode: latin1 },
    (p) =>
      lines(
        ["! Strahler über Grund", "# MHz S RI R 50", ...p.map((q) => `${q.mhz.toFixed(4)} ${ri(q)}`)],
        "\r",
      ),
  ),
  fixture(
    "per-port-reference.s2p",
    "Version 1.1 with a reference for each port.",
    { model: VHF75, quantity: "gamma" },
    (p) => lines(["# MHz S RI R 75 50", ...p.map((q) => `${q.mhz.toFixed(3)} ${two(q)}`)]),
  ),
  fixture(
    "two-option-lines.s1p",
    "A second option line, which counts for nothing.",
    { model: HF, quantity: "gamma" },
    (p) => lines(["# MHz S RI R 50", "# GHz S MA R 75", ...p.map((q) => `${q.mhz.toFixed(4)} ${ri(q)}`)]),
  ),
  fixture(
    "falling.s1p",
    "Frequencies fall, against the specification.",
    { model: HF, quantity: "gamma" },
    (p) => lines(["# MHz S RI R 50", ...p.map((q) => `${q.mhz.toFixed(4)} ${ri(q)}`).reverse()]),
  ),
  fixture(
    "comment-data.s1p",
    "Comments with numbers after every point.",
    { model: HF, quantity: "gamma" },
    (p) =>
      lines([
        "# MHz S RI",
        ...p.flatMap((q) => [`${q.mhz.toFixed(4)} ${ri(q)}`, "! Port Impedance 50.0 0.0", ""]),
      ]),
  ),
  fixture(
    "one-port-in.s2p",
    "The name says two ports, the rows hold one.",
    { model: HF, quantity: "gamma" },
    (p) => lines(["# MHz S RI R 50", ...p.map((q) => `${q.mhz.toFixed(4)} ${ri(q)}`)]),
  ),
  fixture(
    "three-ports.s3p",
    "Three ports, a row of the matrix a line.",
    { model: VHF, quantity: "gamma" },
    (p) =>
      lines([
        "# MHz S RI R 50",
        ...p.flatMap((q) => [`${q.mhz.toFixed(3)} ${ri(q)} 0 0 0 0`, "0 0 0.1 0 0 0", "0 0 0 0 0.2 0"]),
      ]),
  ),
];
