import { expect, test } from "vitest";
import { movementWords, stopWords, type TrailNumbers, timeWords } from "../../app/charts/trail-words.ts";

const DAY_MS = 86_400_000;
const numbers = (mhz: number, uncertaintyHz: number | null, day: number | null): TrailNumbers => ({
  frequencyHz: mhz * 1e6,
  frequencyUncertaintyHz: uncertaintyHz,
  minimumSwr: 1.2,
  minimumSwrLow: 1.1,
  minimumSwrHigh: 1.3,
  at: day === null ? null : new Date(Date.UTC(2026, 0, day)),
});

test("movement is said where it is larger than both limits together", () => {
  expect(movementWords(numbers(7, 1e3, 1), numbers(7.4, 1e3, 43))).toBe("400\u2009kHz up in 6 weeks");
  expect(movementWords(numbers(7.4, 1e3, 1), numbers(7, 1e3, null))).toBe("400\u2009kHz down");
  expect(movementWords(numbers(7, 30e3, 1), numbers(7.04, 30e3, 2))).toBe("");
  expect(movementWords(numbers(7, null, 1), numbers(9, 1e3, 2))).toBe("");
});

test("times in the unit that suits them", () => {
  expect([0.02, 0.05, 1, 13, 14, 91, 800].map((days) => timeWords(days * DAY_MS))).toEqual([
    "",
    "1 hour",
    "1 day",
    "13 days",
    "2 weeks",
    "3 months",
    "2 years",
  ]);
  expect(timeWords(-DAY_MS)).toBe("");
});

test("a stop's frequency and SWR; one without an SWR says infinite", () => {
  expect(stopWords(numbers(7.118, 1e3, 1))).toBe("7.118\u2009MHz, SWR 1.2 (1.1–1.3)");
  expect(stopWords({ ...numbers(7, null, 1), minimumSwr: null, minimumSwrLow: null })).toBe(
    "7\u2009MHz, SWR ∞",
  );
});
