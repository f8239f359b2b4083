import { describe, expect, it } from "vitest";
import type { StoredCorrection } from "~/db/schema";
import { correctionWords, planeWords } from "~/routes/sweeps/correction-words";

const SCALAR: StoredCorrection = {
  kind: "scalar",
  plane: "port",
  fromHz: 1e6,
  toHz: 99.8e6,
  bench: { bench: "bench00001", version: "version001", number: 1, name: "Home bridge" },
  references: { open: "a", short: "b", load: "c" },
  feedline: null,
  validFrom: "2026-05-03T00:00:00.000Z",
};
const LINE = { name: "RG-58", k1: 0.01, k2: 0, lengthM: 12, velocityFactor: 0.66 };

describe("what was done, in one line", () => {
  it.each<[StoredCorrection | null, string, string]>([
    [null, "As measured: nothing is corrected", "as measured"],
    [
      SCALAR,
      "Corrected with the bench “Home bridge” as of 3 May 2026: 0 dB line from open and short, 1–99.8\u2009MHz.",
      "at the port, corrected in size",
    ],
    [
      { ...SCALAR, plane: "antenna", feedline: LINE, references: { short: "b" } },
      "0 dB line from the short alone, 1–99.8\u2009MHz; 12.0\u2009m of RG-58 taken away.",
      "at the antenna, corrected in size",
    ],
    [{ ...SCALAR, kind: "three-term" }, "three error terms from open, short and load", "in three terms"],
    [{ ...SCALAR, references: {} }, "0 dB line at the level that was given", "at the port"],
    [
      { ...SCALAR, kind: "none", plane: "instrument", fromHz: null, toHz: null },
      "Nothing corrected: the bench “Home bridge”",
      "as measured",
    ],
    [
      { ...SCALAR, kind: "none", plane: "antenna", bench: null, feedline: LINE },
      "As measured without a bench; 12.0\u2009m of RG-58 taken away.",
      "at the antenna, no bench",
    ],
  ])("%#", (correction, words, short) => {
    expect(correctionWords(correction)).toContain(words);
    expect(planeWords(correction)).toContain(short);
  });
});
