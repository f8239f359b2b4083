import { describe, expect, it } from "vitest";
import { themeCookie, themeFromCookie } from "../../app/components/theme.ts";
import { nextSort, parseSort, sortRows } from "../../app/components/ui/sort.ts";
import { formatDate, formatDateTime, formatRelative } from "../../app/services/dates.ts";

describe("theme", () => {
  it("comes back from the cookie it was kept in", () => {
    for (const choice of ["light", "dark", "system"] as const) {
      expect(themeFromCookie(`a=b; ${themeCookie(choice).split(";")[0]}; c=d`)).toBe(choice);
    }
  });

  it("is the system's where nothing sensible was kept", () => {
    for (const header of [null, "", "theme=", "theme=neon", "mytheme=dark", "theme"]) {
      expect(themeFromCookie(header)).toBe("system");
    }
  });
});

describe("sort", () => {
  const fallback = { key: "frequency", direction: "ascending" as const };

  it("reads an address and falls back on anything else", () => {
    expect(parseSort("-swr", ["swr"], fallback)).toEqual({ key: "swr", direction: "descending" });
    expect(parseSort("swr", ["swr"], fallback)).toEqual({ key: "swr", direction: "ascending" });
    for (const param of [null, "", "-", "constructor"])
      expect(parseSort(param, ["swr"], fallback)).toBe(fallback);
  });

  it("turns round on the second press", () => {
    expect(nextSort("swr", fallback)).toBe("swr");
    expect(nextSort("frequency", fallback)).toBe("-frequency");
    expect(nextSort("frequency", { ...fallback, direction: "descending" })).toBe("frequency");
  });

  it("orders numbers as numbers, words with their numbers, and puts what is unknown last both ways", () => {
    const by = (value: number | string | null) => value;
    const infinite = Number.POSITIVE_INFINITY;
    expect(sortRows([10, null, 9, infinite], by, "ascending")).toEqual([9, 10, infinite, null]);
    expect(sortRows([10, null, 9, Number.NaN], by, "descending").slice(0, 2)).toEqual([10, 9]);
    expect(sortRows(["b10", "b9", "a"], by, "ascending")).toEqual(["a", "b9", "b10"]);
    expect(sortRows([infinite, infinite, 1], by, "ascending")).toEqual([1, infinite, infinite]);
  });

  it("keeps the order of equals and leaves the given rows alone", () => {
    const rows = [
      { at: 1, id: "a" },
      { at: 1, id: "b" },
      { at: 0, id: "c" },
    ];
    expect(sortRows(rows, (row) => row.at, "descending").map((row) => row.id)).toEqual(["a", "b", "c"]);
    expect(rows[0].id).toBe("a");
  });
});

describe("dates", () => {
  const at = new Date("2026-09-04T05:07:59Z");

  it("are said in UTC", () => {
    expect(formatDate(at)).toBe("4 Sep 2026");
    expect(formatDateTime(at)).toBe("4 Sep 2026, 05:07 UTC");
  });

  it("are said by their distance for a month, then by their day", () => {
    const later = (seconds: number) => formatRelative(at, new Date(at.getTime() + seconds * 1000));
    expect([0, 59, 60, 119, 3600, 86_399, 86_400].map(later)).toEqual([
      "just now",
      "just now",
      "1 minute ago",
      "1 minute ago",
      "1 hour ago",
      "23 hours ago",
      "1 day ago",
    ]);
    expect(later(29 * 86_400)).toBe("29 days ago");
    expect(later(30 * 86_400)).toBe("4 Sep 2026");
    expect(later(-30)).toBe("just now");
    expect(later(-3600)).toBe("4 Sep 2026");
  });
});
