import { expect, test } from "vitest";
import { bytesWords, correctionWords, readingWords } from "../../../app/routes/plates/source-words.ts";

const correction = {
  kind: "scalar" as const,
  plane: "antenna" as const,
  fromHz: 1e6,
  toHz: 60e6,
  feedline: { name: "RG-58", lengthM: 12 },
  references: {},
};

test("an original says how it became numbers", () => {
  expect(readingWords({ reading: { format: "touchstone", quantity: "gamma" } })).toBe(
    "Touchstone, read as Γ",
  );
  expect(readingWords({ reading: { format: "text", quantity: "s11-db" } })).toBe("Text, read as S11 in dB");
  expect([bytesWords(999), bytesWords(34_200), bytesWords(2_500_000)]).toEqual([
    "999 bytes",
    "34.2 kB",
    "2.5 MB",
  ]);
});

test("and what was corrected, or that nothing was and what is not known for it", () => {
  expect(correctionWords({ correction: null, bench: null })).toMatch(/unknown/);
  const words = correctionWords({ correction, bench: { name: "Bridge", version: 2 } });
  expect(words).toMatch(
    /the bench “Bridge”, version 2: 0 dB line from its open and short, 1.*MHz to 60.*MHz/,
  );
  expect(words).toMatch(/12\.0\sm of RG-58 taken away\.$/);
  const none = { ...correction, kind: "none" as const, plane: "port" as const };
  expect(correctionWords({ correction: none, bench: null })).toBe("Nothing corrected by a bench.");
});
