/** Where the names of trails stand, each beside its newest stop and on no other name. Pure. */

export interface Named {
  id: string;
  name: string;
  /** Newest first; px. */
  stops: readonly { x: number; y: number }[];
}

export interface PlacedName {
  x: number;
  y: number;
  anchor: "start" | "end";
}

/** `blocked`: where other words stand. In the given order; a name that fits nowhere is where it is least in the way of the axis: right of its stop. */
export function placeNames(
  trails: readonly Named[],
  widthPx: number,
  blocked: readonly Box[] = [],
): Map<string, PlacedName> {
  const taken: Box[] = [...blocked];
  const lines = trails.flatMap(({ id, stops }) =>
    stops.slice(0, 2).map(({ x, y }) => ({ id, left: x - 5, right: x + 5, top: y - 12, bottom: y + 60 })),
  );
  const placed = new Map<string, PlacedName>();
  for (const { id, name, stops } of trails) {
    const [newest] = stops;
    if (!newest) continue;
    const options = SHIFTS_PX.flatMap((shift) =>
      (["start", "end"] as const).map((anchor) => ({
        anchor,
        x: newest.x + (anchor === "start" ? GAP_PX : -GAP_PX),
        y: newest.y + shift,
      })),
    );
    const others = lines.filter((line) => line.id !== id);
    const fits = (box: Box) => box.left >= 0 && box.right <= widthPx && !taken.some((one) => touch(one, box));
    const free = options.find((at) => {
      const box = boxOf(at, name);
      return fits(box) && !others.some((line) => touch(line, box));
    });
    const at = free ?? options.find((one) => fits(boxOf(one, name))) ?? options[0];
    taken.push(boxOf(at, name));
    placed.set(id, at);
  }
  return placed;
}

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

function boxOf({ x, y, anchor }: PlacedName, name: string): Box {
  const width = Array.from(name).length * CHARACTER_PX;
  const left = anchor === "start" ? x : x - width;
  return { left, right: left + width, top: y - 11, bottom: y + 3 };
}

function touch(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

const GAP_PX = 9;
/** Under the stop, where the land is; over it last. */
const SHIFTS_PX = [13, 28, 43, 0, -13];
/** Of the bold letters, rather wide. */
const CHARACTER_PX = 7;
