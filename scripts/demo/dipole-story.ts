import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { type Feedline, type Instrument, LIGHT_SPEED, type Resonator, reflection } from "./antenna.ts";
import { atBridge, ZERO_DBM } from "./bridge.ts";
import { changed, described, pictured } from "./deeds.ts";
import { levelFile, returnLossFile, type Span, swrFile } from "./files.ts";
import { makes } from "./quantities.ts";
import { gaussBy } from "./random.ts";
import { decided, said, swept } from "./steps.ts";
import { on, type Step, type Story } from "./story.ts";
import { khz, mhz, percent } from "./told.ts";

const FIRST_M = 14.4;
const CUT_M = 13.78;
const WANTED_HZ = 10.125e6;
const SPAN: Span = { startHz: 5e6, stopHz: 35e6, points: 601 };
const FEEDLINE: Feedline = { lengthM: 9, velocityFactor: 0.66, k1: 0.0137, k2: 0.0002 };
/** Its own leakage comes with the bridge. */
const BRIDGE: Instrument = { noise: 0.003, directivity: 0 };
const POCKET: Instrument = { noise: 0.0025, directivity: 0.006 };

export function dipoleStory(): Story {
  return {
    title: "A dipole for 30 metres under a tiled roof",
    summary: `A wire under the rafters, because nothing may show outside. How far down do tiles pull it, and what does rain on them do?

An invented attic of the invented *Fennmarsh Antenna Circle*; every number comes out of a small model.`,
    visibility: "public",
    owner: "cleo-reed",
    members: [
      { who: "ada-marsh", role: "experimenter" },
      { who: "bram-sedge", role: "experimenter" },
      { who: "dov-heron", role: "commenter" },
    ],
    bands: [{ name: "30 m", lowHz: 10.1e6, highHz: 10.15e6, swrLimit: 2 }],
    steps: [...hung(), ...cut()],
  };
}

function hung(): Step[] {
  return [
    described("cleo-reed", on(5, 2, 14, 30), "As hung", () => ANTENNA),
    pictured("cleo-reed", on(5, 2, 14, 40), "attic", ATTIC),
    swept({
      key: "hung",
      by: "cleo-reed",
      at: on(5, 2, 15, 0),
      title: "As hung, dry tiles",
      fileName: "attic_dry.csv",
      bytes: returnLossFile(SPAN, attic("hung", FIRST_M, false), "attic, dry"),
    }),
    said("cleo-reed", on(5, 2, 16, 30), { sweep: "hung", nearMhz: 9.7 }, (t) => {
      const { hz, link } = t.dip("hung", 9.7);
      const free = LIGHT_SPEED / (2 * FIRST_M);
      return `${FIRST_M.toFixed(2)} m of insulated wire, a hand's breadth under the tiles. Half a wave in free space would be ${mhz(free)}; it is at ${link}, so the shortening is ${(hz / free).toFixed(3)}. Wires in the open come out at 0.95 to 0.97, so the roof takes its share.`;
    }),
    swept({
      key: "wet",
      by: "cleo-reed",
      at: on(5, 3, 8, 30),
      title: "As hung, after a wet night",
      fileName: "attic_wet.csv",
      bytes: returnLossFile(SPAN, attic("wet", FIRST_M, true), "attic, wet tiles"),
    }),
    said(
      "cleo-reed",
      on(5, 3, 9, 15),
      { sweep: "wet", nearMhz: 9.6 },
      (t) => {
        const [dry, wet] = [t.dip("hung", 9.7), t.dip("wet", 9.6)];
        return `Soaked tiles: ${dry.link} became ${wet.link}, ${khz(wet.hz - dry.hz)} lower, and the dip went from ${dry.w} to ${wet.w} wide.`;
      },
      { key: "soaked" },
    ),
    said(
      "dov-heron",
      on(5, 3, 10, 5),
      { sweep: "wet", nearMhz: 9.6 },
      "Lower is the water's permittivity, wider is its loss. If the two were only detuning, the width would have stayed. I would expect the wet wire to be a few tenths of a decibel worse on the air, and nobody to notice.",
      { key: "permittivity", answers: "soaked" },
    ),
    said("bram-sedge", on(5, 3, 11, 40), { sweep: "wet", nearMhz: 9.6 }, "So trim it for dry or for wet?", {
      key: "dry-or-wet",
      answers: "permittivity",
    }),
    said(
      "cleo-reed",
      on(5, 3, 12, 10),
      { sweep: "wet", nearMhz: 9.6 },
      "For dry. The dip is wider than the difference and the whole band is 50 kHz, so rain stays inside the limit either way.",
      { answers: "dry-or-wet" },
    ),
  ];
}

function cut(): Step[] {
  return [
    said("cleo-reed", on(5, 9, 9, 0), {}, (t) => {
      const { hz, f } = t.dip("hung", 9.7);
      return `The sum for the cut: ${FIRST_M.toFixed(2)} m × ${f} / ${mhz(WANTED_HZ, 3)} = ${((FIRST_M * hz) / WANTED_HZ).toFixed(2)} m. I take off a little less and fold the ends back first.`;
    }),
    changed("cleo-reed", on(5, 9, 10, 30), {
      key: "cut",
      title: `Dipole cut to ${CUT_M.toFixed(2)} m`,
      body: "The same from both ends.",
      quantities: [makes("wire", "lengthM", "Dipole, length", CUT_M)],
    }),
    swept({
      key: "cut",
      by: "cleo-reed",
      at: on(5, 9, 11, 0),
      title: `Cut to ${CUT_M.toFixed(2)} m, dry`,
      fileName: "attic_cut.csv",
      bytes: returnLossFile(SPAN, attic("cut", CUT_M, false), "attic, cut"),
    }),
    said("cleo-reed", on(5, 9, 11, 25), { sweep: "cut", nearMhz: 10.12 }, (t) => {
      const { link, hz, s } = t.dip("cut", 10.12);
      return `${link}, ${percent(hz / WANTED_HZ, 2)} from what I wanted. SWR ${s} at the dip, ${t.swrAt("cut", 10.1)} and ${t.swrAt("cut", 10.15)} at the band's edges.`;
    }),
    decided(
      "cleo-reed",
      on(5, 9, 11, 30),
      { sweep: "cut", nearMhz: 10.12 },
      "settle",
      "The dipole's half wave, cut for dry tiles",
    ),
    said("dov-heron", on(5, 9, 13, 0), { sweep: "cut", nearMhz: 30.5 }, (t) => {
      const [first, third] = [t.dip("cut", 10.12), t.dip("cut", 30.5)];
      return `And three half waves at ${third.link}: ${percent(third.hz / (3 * first.hz))} from three times the first. It lies outside every band of the project, so it stays a finding.`;
    }),
    swept({
      key: "bridge",
      by: "ada-marsh",
      at: on(5, 10, 14, 0),
      title: "The same with the club's bridge",
      fileName: "Dachboden_Bruecke.txt",
      bytes: levelFile(
        SPAN,
        atBridge("rebuilt", attic("bridge", CUT_M, false, BRIDGE)),
        ZERO_DBM,
        "Dachboden",
      ),
      given: { text: { zeroDb: ZERO_DBM } },
      bench: "bridge",
    }),
    said("ada-marsh", on(5, 10, 14, 50), { sweep: "bridge", nearMhz: 10.12 }, (t) => {
      const { link, pm, s } = t.dip("bridge", 10.12);
      return `Brought the bridge along: ${link}, ${pm}, SWR ${s}. This one has a bench behind it, so its limits hold the bridge's errors too; the others say “unknown” there, which is the truth about them.`;
    }),
    swept({
      key: "summer",
      by: "bram-sedge",
      at: on(5, 30, 16, 0),
      title: "Three dry weeks later",
      fileName: "attic_summer.tsv",
      bytes: swrFile(SPAN, attic("summer", CUT_M * 0.9985, false), "attic, three dry weeks"),
    }),
    said("bram-sedge", on(5, 30, 16, 45), { sweep: "summer", nearMhz: 10.12 }, (t) => {
      const [before, now] = [t.dip("cut", 10.12), t.dip("summer", 10.12)];
      return `Checked it while I was up there for the wasps. ${before.f} then, ${now.link} now: ${khz(now.hz - before.hz)} higher, and I know either to ${now.pm}. Drier wood, I suppose, or the wasps.`;
    }),
  ];
}

function attic(name: string, lengthM: number, wet: boolean, instrument = POCKET) {
  return reflection(resonatorsOf(lengthM, wet), FEEDLINE, instrument, gaussBy(`attic ${name}`));
}

/** Wet tiles slow the wave and take power: lower, wider, more resistance. */
function resonatorsOf(lengthM: number, wet: boolean): Resonator[] {
  const shortening = wet ? 0.922 : 0.931;
  const ohm = wet ? 56 : 43;
  const hz = (shortening * LIGHT_SPEED) / (2 * lengthM);
  return [
    { hz, ohm, q: 640 / ohm },
    { hz: hz * 3.03, ohm: ohm + 52, q: 1500 / (ohm + 52) },
  ];
}

const ANTENNA: Antenna = {
  ...NO_ANTENNA,
  elements: [
    {
      key: "wire",
      kind: "dipole",
      name: "Dipole",
      lengthM: FIRST_M,
      count: 1,
      heightM: 6.2,
      diameterMm: 2.2,
      material: "stranded copper",
      insulated: true,
      where: "under the rafters, a hand's breadth below the tiles",
    },
  ],
  feedline: {
    cable: null,
    lengthM: FEEDLINE.lengthM,
    velocityFactor: FEEDLINE.velocityFactor,
    route: "down the stairwell to the desk",
  },
  ground: "None: under the roof",
};
const ATTIC = "The wire under the tiles. Drawn, not photographed: the attic is invented.";
