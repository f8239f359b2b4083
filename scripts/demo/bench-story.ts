import * as benches from "~/db/benches.server";
import type { BenchPart } from "~/db/schema/index";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { type TakeReferences, takeReferences } from "~/services/bench-references.server";
import { createBench, rebuildBench } from "~/services/benches.server";
import { addPhotograph } from "~/services/photographs.server";
import { atBridge, type Built, STANDARDS, THROUGH_DB, ZERO_DBM } from "./bridge.ts";
import { deed } from "./deeds.ts";
import { levelFile, type Span } from "./files.ts";
import { pictureOf } from "./pictures.ts";
import { gaussBy } from "./random.ts";
import { idOf } from "./stage.ts";
import { said, swept } from "./steps.ts";
import { on, type Step, type Story } from "./story.ts";
import { dbm } from "./told.ts";

const SPAN: Span = { startHz: 1e6, stopHz: 100e6, points: 991 };
const GIVEN = { text: { zeroDb: ZERO_DBM } };

export function benchStory(): Story {
  return {
    title: "The bench: our bridge under test",
    summary: `Open, short and load sweeps of the home-made return loss bridge, before anybody believes a number from it.

Invented, as all of the *Fennmarsh Antenna Circle*.`,
    visibility: "private",
    owner: "ada-marsh",
    members: [
      { who: "cleo-reed", role: "experimenter" },
      { who: "bram-sedge", role: "reader" },
    ],
    bands: [],
    steps: [
      sweep("open", "Port open", 1, 0),
      sweep("short", "Port shorted", 1, 12),
      said(
        "ada-marsh",
        on(2, 21, 16, 0),
        { sweep: "short" },
        (t) =>
          `The 0 dB line given to all of these is ${dbm(ZERO_DBM)}, from the generator's 0 dBm and the 12.04 dB that an ideal bridge loses. Against it the open reads ${t.loss("open", 10)} at 10 MHz and the short ${t.loss("short", 10)}; at 90 MHz ${t.loss("open", 90)} and ${t.loss("short", 90)}. An ideal bridge would give 0 for both, everywhere.`,
        { key: "zero" },
      ),
      said(
        "cleo-reed",
        on(2, 21, 17, 30),
        { sweep: "short" },
        "They lean apart with frequency, one up and one down, which is the source match. The mean of the two amplitudes cancels most of it, so we should take that as the line and not the open alone.",
        { answers: "zero" },
      ),
      sweep("load", "Port with the 50 Ω load", 2, 0),
      said(
        "ada-marsh",
        on(2, 21, 18, 40),
        { sweep: "load" },
        (t) =>
          `With the best load we have: ${t.loss("load", 10)} down at 10 MHz, ${t.loss("load", 50)} at 50, ${t.loss("load", 90)} at 90. That is the bridge's leakage and the load's own error together; which is which this sweep can't say.`,
        { key: "leak" },
      ),
      said(
        "cleo-reed",
        on(2, 21, 19, 15),
        { sweep: "load" },
        (t) => {
          const worst = 10 ** (-t.lossDb("load", 90) / 20);
          const size = 0.2;
          const swr = (gamma: number) => ((1 + gamma) / (1 - gamma)).toFixed(2);
          return `So taken as directivity alone an SWR of 1.50 is anything from ${swr(size - worst)} to ${swr(size + worst)} at 90 MHz. Good enough for trimming, not for a paper.`;
        },
        { answers: "leak" },
      ),
      built(),
      said(
        "ada-marsh",
        on(2, 21, 19, 50),
        {},
        (t) =>
          `${t.bench("bridge")} now has a page of its own, with these three and a sweep straight through as its references. It is my bench, so it can be chosen in every project where I may add sweeps.`,
      ),
      sweep("worn", "The old load from the drawer", 3, 0),
      said("ada-marsh", on(2, 22, 10, 20), { sweep: "worn" }, (t) => {
        const gamma = 10 ** (-t.lossDb("worn", 10) / 20);
        return `${t.loss("worn", 10)} at 10 MHz. That would be ${(50 * ((1 + gamma) / (1 - gamma))).toFixed(1)} Ω or ${(50 * ((1 - gamma) / (1 + gamma))).toFixed(1)} Ω; the ohmmeter says 53.1. It goes back into the drawer with a label.`;
      }),
      rebuilt(),
      said(
        "cleo-reed",
        on(3, 27, 20, 10),
        {},
        (t) =>
          `Opened the tin, picked resistors to a thousandth, put it together again. It is another bench from today on: ${t.bench("bridge")} has a second version with references of its own, and what was swept before keeps the first.`,
      ),
    ],
  };
}

/** The bench as it was on both days, with references that are the sweeps above, or new ones. */
function built(): Step {
  return deed("ada-marsh", on(2, 21, 19, 40), async ({ project, benchIds, told }, by, at) => {
    const values = { name: BENCH, description: DESCRIPTION, own: "yes" as const };
    const first = { ...NOTHING_SAID, validFrom: on(2, 21, 13, 30), remark: "As first built", parts: PARTS };
    const { bench, version } = await createBench(project, by, values, first);
    benchIds.set("bridge", bench.id);
    await referred({ project, bench, version, by }, "first");
    told.addBench("bridge", BENCH, bench.publicId);
    await addPhotograph({
      of: { projectId: project.id, benchId: bench.id },
      project,
      by,
      file: { name: "bridge.png", bytes: pictureOf("bridge") },
      at,
      caption:
        "The bridge in its tin, open, short and load beside it. Drawn, not photographed: the club is invented.",
    });
    await benches.update(bench.id, { createdAt: at });
  });
}

function rebuilt(): Step {
  return deed("ada-marsh", on(3, 27, 18, 0), async ({ project, benchIds }, by, at) => {
    const bench = await benches.findById(idOf(benchIds, "bridge", "bench"));
    if (!bench) throw new Error("The demo's bench is gone.");
    const remark = "Resistors picked to 0.1 %, the balun on a larger core";
    const version = await rebuildBench(bench, by, { ...NOTHING_SAID, validFrom: at, remark, parts: PARTS });
    await referred({ project, bench, version, by }, "rebuilt");
  });
}

async function referred(into: TakeReferences, when: Built): Promise<void> {
  const files = (["open", "short", "load", "through"] as const).map((kind) => ({
    kind,
    file: { name: nameOf(kind, when), bytes: fileOf(kind, when) },
  }));
  for (const { how, kind, message } of await takeReferences(into, files)) {
    if (how !== "read" && how !== "shared") throw new Error(`The demo's ${kind} of its bench: ${message}`);
  }
}

function sweep(port: keyof typeof STANDARDS, title: string, hour: number, minute: number): Step {
  return swept({
    key: port,
    by: "ada-marsh",
    at: on(2, 21, 13 + hour, minute),
    title,
    fileName: nameOf(port, "first"),
    bytes: fileOf(port, "first"),
    given: GIVEN,
  });
}

function fileOf(port: keyof typeof STANDARDS | "through", when: Built): Uint8Array {
  const gauss = gaussBy(`bench ${port} ${when}`);
  const seen =
    port === "through" ? () => ({ re: 10 ** (THROUGH_DB / 20), im: 0 }) : atBridge(when, STANDARDS[port]);
  const noisy = (hz: number) => {
    const { re, im } = seen(hz);
    return { re: re + 0.0008 * gauss(), im: im + 0.0008 * gauss() };
  };
  return levelFile(SPAN, noisy, ZERO_DBM, `${port}, ${when === "first" ? "wie gebaut" : "nach dem Umbau"}`);
}

function nameOf(port: string, when: Built): string {
  return `Bruecke_${port}${when === "first" ? "" : "_2"}.txt`;
}

const NOTHING_SAID = { standards: IDEAL_STANDARDS, given: { ...NOTHING_GIVEN, zeroDb: ZERO_DBM } };
const BENCH = "The club's bridge";
const DESCRIPTION = `A resistive 50 Ω bridge in a tin, between a tracking generator at 0 dBm and a spectrum analyser. Ten minutes of warming up before anything counts.

Never transmit into it: its resistors bear a quarter of a watt.`;
const PARTS: BenchPart[] = [
  { kind: "connector", text: "BNC at the port, a new one since February" },
  { kind: "cable", text: "Two 30 cm leads to generator and analyser, 50 Ω" },
];
