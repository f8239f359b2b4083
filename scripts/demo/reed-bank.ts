import {
  type Feedline,
  halfWaveOfBraid,
  type Instrument,
  NO_FEEDLINE,
  quarterWave,
  type Resonator,
  reflection,
} from "./antenna.ts";
import { atBridge, type Built, ZERO_DBM } from "./bridge.ts";
import { impedanceFile, levelFile, returnLossFile, type Span, swrFile, touchstoneFile } from "./files.ts";
import { gaussBy } from "./random.ts";

/** The invented vertical on the reed bank as it was at each sweep, and the file that each sweep gave. */

export interface State {
  longM: number;
  shortM: number;
  /** Free length of the braid between the hub and the earth stake; null with the choke at the hub. */
  braidM: number | null;
  radials: number;
}

export const AS_BUILT: State = { longM: 10.62, shortM: 4.13, braidM: 2.76, radials: 8 };
export const SHORT_CUT: State = { ...AS_BUILT, shortM: 4.0 };
export const BOTH_CUT: State = { ...SHORT_CUT, longM: 10.24 };
export const MORE_RADIALS: State = { ...BOTH_CUT, radials: 24 };
export const STAKE_FAR: State = { ...MORE_RADIALS, braidM: 3.24 };
export const STAKE_NEAR: State = { ...MORE_RADIALS, braidM: 2.31 };
export const CHOKED: State = { ...MORE_RADIALS, braidM: null };

const WIDE: Span = { startHz: 1e6, stopHz: 60e6, points: 591 };
const WIDER: Span = { startHz: 1e6, stopHz: 80e6, points: 791 };
export const FEEDLINE: Feedline = { lengthM: 12, velocityFactor: 0.82, k1: 0.0057, k2: 0.0001 };
const POCKET: Instrument = { noise: 0.0025, directivity: 0.008 };
/** Its own leakage comes with the bridge. */
const BRIDGE: Instrument = { noise: 0.003, directivity: 0 };
const LABORATORY: Instrument = { noise: 0.0006, directivity: 0.001 };

/** The files in the order in which they were taken. */
export function reedBankFiles() {
  return {
    asBuilt: returnLossFile(WIDE, seen("as-built", AS_BUILT, POCKET), "reed bank, as built"),
    rain: returnLossFile(WIDE, seen("rain", AS_BUILT, POCKET), "reed bank, after the rain"),
    bridge: levelFile(
      { ...WIDE, points: 1181 },
      bridged("first", "bridge", AS_BUILT),
      ZERO_DBM,
      "Schilfbank, wie gebaut",
    ),
    laboratory: touchstoneFile(
      { ...WIDE, points: 1181 },
      seen("laboratory", AS_BUILT, LABORATORY),
      "RI",
      "reed bank, in the shack, calibrated at the cable's end there",
    ),
    shortCut: returnLossFile(
      WIDE,
      seen("short-element", SHORT_CUT, POCKET),
      "reed bank, short element 4.00 m",
    ),
    bothCut: impedanceFile(WIDE, seen("both-cut", BOTH_CUT, POCKET), "reed bank, long element 10.24 m"),
    closeLook: touchstoneFile(
      { startHz: 46e6, stopHz: 58e6, points: 601 },
      seen("close-look", BOTH_CUT, LABORATORY),
      "MA",
      "reed bank, near the odd dip",
    ),
    radials: levelFile(
      { ...WIDE, points: 1181 },
      bridged("rebuilt", "radials", MORE_RADIALS),
      ZERO_DBM,
      "Schilfbank, 24 Radials",
    ),
    hub: touchstoneFile(
      WIDE,
      seen("hub", { ...MORE_RADIALS, braidM: null }, LABORATORY, NO_FEEDLINE),
      "RI",
      "reed bank, at the hub, feedline taken off",
    ),
    shackChoke: swrFile(WIDE, seen("shack-choke", MORE_RADIALS, POCKET), "reed bank, beads at the shack"),
    stakeFar: touchstoneFile(
      { ...WIDE, points: 1181 },
      seen("stake-far", STAKE_FAR, LABORATORY),
      "RI",
      "reed bank, stake at 3.24 m",
    ),
    stakeNear: returnLossFile(WIDE, seen("stake-near", STAKE_NEAR, POCKET), "reed bank, stake at 2.31 m"),
    stakeNearWide: returnLossFile(
      WIDER,
      seen("stake-near-wide", STAKE_NEAR, POCKET),
      "reed bank, stake at 2.31 m, to 80 MHz",
    ),
    choked: levelFile(
      { ...WIDER, points: 1581 },
      bridged("rebuilt", "choked", CHOKED),
      ZERO_DBM,
      "Schilfbank, Drossel am Fusspunkt",
    ),
    final: touchstoneFile(
      { ...WIDER, points: 1581 },
      seen("final", CHOKED, LABORATORY),
      "RI",
      "reed bank, as it stays",
    ),
    againOne: again("once"),
    againTwo: again("twice"),
    againThree: again("three times"),
  };
}

/** What the two pictures of 28 March show: abs Γ of the antenna with its 24 radials. */
export function radialsOnScreen(name: string): (hz: number) => number {
  const gamma = seen(name, MORE_RADIALS, LABORATORY);
  return (hz) => Math.hypot(gamma(hz).re, gamma(hz).im);
}

function seen(name: string, state: State, instrument: Instrument, feedline: Feedline = FEEDLINE) {
  return reflection(resonatorsOf(state), feedline, instrument, gaussBy(name));
}

function again(time: string): Uint8Array {
  const span = { startHz: 5e6, stopHz: 25e6, points: 401 };
  return touchstoneFile(span, seen(`again ${time}`, CHOKED, LABORATORY), "RI", `reed bank, ${time}`);
}

function bridged(built: Built, name: string, state: State) {
  return atBridge(built, seen(name, state, BRIDGE));
}

/** Radials on the ground lower its loss: the resistance falls towards the radiation resistance. */
function resonatorsOf({ longM, shortM, braidM, radials }: State): Resonator[] {
  const groundOhm = 80 / radials;
  const elements = [
    ...quarterWave(longM, 0.97, 36 + groundOhm, 620),
    ...quarterWave(shortM, 0.965, 58 + groundOhm, 600),
  ];
  return braidM === null ? elements : [...elements, halfWaveOfBraid(braidM)];
}
