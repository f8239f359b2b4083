import type { Complex } from "./antenna.ts";
import { levelFile, type Span } from "./files.ts";
import { gaussBy } from "./random.ts";
import { said, swept } from "./steps.ts";
import { on, type Step, type Story } from "./story.ts";
import { dbm } from "./told.ts";

const SPAN: Span = { startHz: 1e6, stopHz: 100e6, points: 991 };
/** Nominal level with the port open or shorted, dBm: 0 dBm less the 12.04 dB of an ideal bridge, rounded. */
const ZERO_DBM = -12;
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
      sweep("worn", "The old load from the drawer", 3, 0),
      said("ada-marsh", on(2, 22, 10, 20), { sweep: "worn" }, (t) => {
        const gamma = 10 ** (-t.lossDb("worn", 10) / 20);
        return `${t.loss("worn", 10)} at 10 MHz. That would be ${(50 * ((1 + gamma) / (1 - gamma))).toFixed(1)} Ω or ${(50 * ((1 - gamma) / (1 + gamma))).toFixed(1)} Ω; the ohmmeter says 53.1. It goes back into the drawer with a label.`;
      }),
    ],
  };
}

const PORTS: Record<string, (hz: number) => Complex> = {
  open: (hz) => leaning(hz, 1),
  short: (hz) => leaning(hz, -1),
  load: (hz) => ({ re: 0.004 * Math.cos(hz / 3e7), im: 0.003 + hz * 1.6e-10 }),
  worn: (hz) => ({ re: 3.1 / 103.1 + 0.003 * Math.cos(hz / 3e7), im: 0.003 + hz * 2.4e-10 }),
};

/** Full reflection with the source match of a bridge: it leans the other way for the other standard. */
function leaning(hz: number, sign: number): Complex {
  const match = 0.01 + hz * 3e-10;
  const turn = hz / 2.4e7;
  const loss = 1 - hz * 2.5e-10;
  return { re: sign * loss * (1 + sign * match * Math.cos(turn)), im: sign * loss * match * Math.sin(turn) };
}

function sweep(port: keyof typeof PORTS & string, title: string, hour: number, minute: number): Step {
  const gauss = gaussBy(`bench ${port}`);
  const noisy = (hz: number) => {
    const { re, im } = PORTS[port](hz);
    return { re: re + 0.0008 * gauss(), im: im + 0.0008 * gauss() };
  };
  return swept({
    key: port,
    by: "ada-marsh",
    at: on(2, 21, 13 + hour, minute),
    title,
    fileName: `Bruecke_${port}.txt`,
    bytes: levelFile(SPAN, noisy, ZERO_DBM, title),
    given: GIVEN,
  });
}
