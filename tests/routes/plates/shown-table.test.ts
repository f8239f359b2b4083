import { describe, expect, test } from "vitest";
import { shownTable } from "../../../app/routes/plates/shown-table.ts";

const COLUMNS = [
  { key: "frequency", label: "Frequency", unit: "MHz" },
  { key: "frequencyHalf", label: "±", unit: "kHz" },
  { key: "swr", label: "Lowest SWR", unit: "" },
  { key: "swrLow", label: "at least", unit: "" },
  { key: "swrHigh", label: "at most", unit: "" },
  { key: "moved", label: "Moved", unit: "kHz" },
  { key: "remark", label: "Remark", unit: "" },
];
const ROW = {
  frequency: 7.0812,
  frequencyHalf: 0.9,
  swr: 1.21,
  swrLow: 1.12,
  swrHigh: 1.31,
  moved: -12.5,
  remark: "-",
};
const cells = (more: Record<string, number | string | null>) =>
  shownTable({ title: "Dips", columns: COLUMNS, rows: [{ ...ROW, ...more }] }).rows[0];

describe("a table as people read it", () => {
  test("has numbers with their limits in one cell, and no column that says nothing", () => {
    const { columns } = shownTable({ title: "Dips", columns: COLUMNS, rows: [ROW] });
    expect(columns.map(({ label }) => label)).toEqual(["Frequency", "Lowest SWR", "Moved, kHz"]);
    expect(cells({})).toEqual({
      frequency: "7.0812\u2009MHz ±\u00a00.9\u2009kHz",
      swr: "1.21 (1.12–1.31)",
      moved: "−12.5",
    });
  });

  test("gives a frequency the decimals that its half-width has", () => {
    expect(cells({ frequency: 55.3, frequencyHalf: 3.6 }).frequency).toBe(
      "55.300\u2009MHz ±\u00a03.6\u2009kHz",
    );
    expect(cells({ frequency: 7.1181, frequencyHalf: 0.35 }).frequency).toBe(
      "7.1181\u2009MHz ±\u00a00.35\u2009kHz",
    );
    expect(cells({ frequency: 55.3, frequencyHalf: 2500 }).frequency).toBe(
      "55.3\u2009MHz ±\u00a02500\u2009kHz",
    );
  });

  test("gives decibels and SWR the zeros that a record does not keep", () => {
    expect(cells({ swr: 1.2, swrLow: 1, swrHigh: 1.31 }).swr).toBe("1.20 (1.00–1.31)");
    expect(cells({ swr: 9.8, swrLow: 9, swrHigh: 12 }).swr).toBe("9.80 (9.00–12.0)");
    const columns = [{ key: "directivity", label: "Directivity", unit: "dB" }];
    const rows = [47, 44.6, 0, null, 0.04].map((directivity) => ({ directivity }));
    expect(shownTable({ title: "Bench", columns, rows }).rows.map(({ directivity }) => directivity)).toEqual([
      "47.0",
      "44.6",
      "0.0",
      "unknown",
      "0.04",
    ]);
  });

  test("says what is not known, and never makes it a zero", () => {
    expect(cells({ swrLow: null, swrHigh: null }).swr).toBe("1.21 (limits unknown)");
    expect(cells({ swrHigh: "∞" }).swr).toBe("1.21 (1.12–∞)");
    expect(cells({ swrLow: null }).swr).toBe("1.21 (unknown–1.31)");
    expect(cells({ swr: null }).swr).toBe("unknown");
    expect(cells({ swr: "∞", swrHigh: "∞" }).swr).toBe("∞");
    expect(cells({ frequencyHalf: null }).frequency).toBe("7.0812\u2009MHz");
    expect(cells({ remark: "at least" }).remark).toBe("at least");
  });

  test("keeps a width that is none, for that is said of the dip", () => {
    const columns = ["width", "widthLow", "widthHigh", "widthRemark"].map((key) => ({
      key,
      label: key,
      unit: "kHz",
    }));
    const none = Object.fromEntries(columns.map(({ key }) => [key, "none"]));
    expect(shownTable({ title: "Dips", columns, rows: [none] }).rows).toEqual([{ width: "none" }]);
  });

  test("of no rows has no columns to show", () => {
    expect(shownTable({ title: "Dips", columns: COLUMNS, rows: [] })).toEqual({
      title: "Dips",
      columns: [],
      rows: [],
    });
  });
});
