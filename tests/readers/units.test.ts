import { expect, test } from "vitest";
import { toHertz } from "~/readers/units";

test("decimal megahertz are whole hertz where that was meant", () => {
  for (let tenths = 1; tenths < 6000; tenths++) {
    expect(toHertz(tenths / 10, 1e6)).toBe(tenths * 100_000);
    expect(toHertz(Number((tenths / 1000).toFixed(3)), 1e9)).toBe(tenths * 1_000_000);
  }
});

test("what is not a rounding error away is left as it is", () => {
  expect(toHertz(7.123_456_789_123, 1e6)).toBe(7.123_456_789_123 * 1e6);
  expect(toHertz(0, 1e6)).toBe(0);
  expect(toHertz(Number.NaN, 1e6)).toBeNaN();
  expect(toHertz(75.349_999_999_9, 1e9)).toBe(75_349_999_999.9);
});
