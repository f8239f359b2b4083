import type { CableEntry, CablePoint } from "./cable-entry.ts";
import { CABLE_SHEETS } from "./cable-sheets.ts";

/**
 * The cable of this name; case, spaces and punctuation don't matter, and a beginning will do ("RG-213" for "RG-213/U
 * (solid PE)") where no digit follows it; of several the first of the table. Null where there is none.
 */
export function cableNamed(name: string): CableEntry | null {
  const wanted = plain(name);
  if (wanted.length < SHORTEST) return null;
  const begins = (cable: CableEntry) =>
    plain(cable.name).startsWith(wanted) && !/^[0-9]/.test(plain(cable.name).slice(wanted.length));
  return CABLES.find((cable) => plain(cable.name) === wanted) ?? CABLES.find(begins) ?? null;
}

/**
 * k1 and k2, dB per metre, of the least relative squares through published points (dB per 100 m): skin effect grows
 * with √f, losses in the insulation with f. Neither is under 0: where the free fit says so, the other alone is fitted.
 * `worstRelative` is the largest deviation of a point from the curve, as a part of the point. One point gives k1 alone;
 * none, or one that is not over 0, throws RangeError.
 */
export function fitCable(points: readonly CablePoint[]): { k1: number; k2: number; worstRelative: number } {
  if (points.length === 0 || points.some(({ mhz, dbPer100m }) => !(mhz > 0 && dbPer100m > 0)))
    throw new RangeError("A cable's loss needs at least one point, each over 0 MHz and 0 dB.");
  let [aa, ab, bb, a, b] = [0, 0, 0, 0, 0];
  for (const { mhz, dbPer100m } of points) {
    const [skin, insulation] = [(100 * Math.sqrt(mhz)) / dbPer100m, (100 * mhz) / dbPer100m];
    aa += skin * skin;
    ab += skin * insulation;
    bb += insulation * insulation;
    a += skin;
    b += insulation;
  }
  const determinant = aa * bb - ab * ab;
  let k1 = a / aa;
  let k2 = 0;
  if (determinant > FLAT * aa * bb) {
    k1 = (a * bb - b * ab) / determinant;
    k2 = (b * aa - a * ab) / determinant;
    if (k2 < 0) [k1, k2] = [a / aa, 0];
    else if (k1 < 0) [k1, k2] = [0, b / bb];
  }
  const off = points.map(({ mhz, dbPer100m }) =>
    Math.abs((100 * (k1 * Math.sqrt(mhz) + k2 * mhz)) / dbPer100m - 1),
  );
  return { k1, k2, worstRelative: Math.max(...off) };
}

function plain(name: string): string {
  return name.toLowerCase().replace(/[^a-z0-9]/g, "");
}

/** "h500", "5dfb" and "rfa" are the shortest names that mean anything. */
const SHORTEST = 3;
/** Points at one frequency leave the two losses inseparable: their determinant is then rounding. */
const FLAT = 1e-12;

/**
 * Down to here k1·√f holds below a sheet's first point: the skin of copper, 66 µm deep at 1 MHz, is then still thin
 * against the conductors of these cables (skin depth: D. M. Pozar, Microwave Engineering, ch. 1, from memory, not seen).
 */
const SKIN_MHZ = 1;

export const CABLES: readonly CableEntry[] = CABLE_SHEETS.map(({ steelCore, ...sheet }) => {
  const { k1, k2 } = fitCable(sheet.points);
  const [{ mhz: first }] = sheet.points;
  return { ...sheet, k1, k2, lowestMhz: steelCore ? first : Math.min(first, SKIN_MHZ) };
});
