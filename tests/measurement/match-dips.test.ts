import fc from "fast-check";
import { expect, test } from "vitest";
import { pairDips } from "../../app/measurement/match-dips.ts";

const near = () => 100;

test("each goes to its own, the rest to none", () => {
  expect(pairDips([1000, 2000, 3000], [1010, 2990], near)).toEqual([0, null, 1]);
  expect(pairDips([1000], [980, 1010], near)).toEqual([1]);
  expect(pairDips([], [1], near)).toEqual([]);
  expect(pairDips([1], [], near)).toEqual([null]);
});

test("any order, gate by frequency, edges of the gate count", () => {
  expect(pairDips([3000, 1000], [1005, 3001], near)).toEqual([1, 0]);
  expect(pairDips([1000, 9000], [1020, 9080], (hz) => hz / 100)).toEqual([null, 1]);
  expect(pairDips([1000], [1100], near)).toEqual([0]);
  expect(pairDips([1000], [1101], near)).toEqual([null]);
});

test("two pairs are better than one shorter one", () => {
  expect(pairDips([1000, 1060], [1050, 1140], near)).toEqual([0, 1]);
});

test("NaN never pairs", () => {
  expect(pairDips([Number.NaN, 1000], [1001, Number.NaN], near)).toEqual([null, 0]);
});

test("as good as trying every pairing", () => {
  const lists = fc.array(fc.integer({ min: 0, max: 300 }), { maxLength: 5 });
  fc.assert(
    fc.property(lists, lists, (from, to) => {
      const gate = () => 40;
      const pairs = pairDips(from, to, gate);
      expect(new Set(pairs.filter((j) => j !== null)).size).toBe(pairs.filter((j) => j !== null).length);
      expect(scoreOf(from, to, pairs)).toEqual(best(from, to, 0, []));
    }),
    { numRuns: 400 },
  );
});

/** Number of pairs and total distance. */
function scoreOf(from: number[], to: number[], pairs: (number | null)[]): [number, number] {
  const apart = pairs.flatMap((j, i) => (j === null ? [] : [Math.abs(from[i] - to[j])]));
  expect(apart.every((d) => d <= 40)).toBe(true);
  return [apart.length, apart.reduce((sum, d) => sum + d, 0)];
}

function best(from: number[], to: number[], i: number, used: number[]): [number, number] {
  if (i === from.length) return [0, 0];
  let found = best(from, to, i + 1, used);
  for (let j = 0; j < to.length; j++) {
    const apart = Math.abs(from[i] - to[j]);
    if (used.includes(j) || apart > 40) continue;
    const [count, sum] = best(from, to, i + 1, [...used, j]);
    if (count + 1 > found[0] || (count + 1 === found[0] && sum + apart < found[1]))
      found = [count + 1, sum + apart];
  }
  return found;
}
