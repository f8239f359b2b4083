import { round } from "./place";
import { STONE_HEIGHT_PX } from "./scene-dips";

export interface CairnProps {
  /** As many stones as there are notes, up to the heap's height; none is an outline of the first. */
  stones: number;
  colour: string;
  /** The ground it lies on, for the gaps between the stones. */
  ground: string;
}

/** A heap of stones hanging down from its origin, widest at the bottom. */
export function Cairn({ stones, colour, ground }: CairnProps) {
  if (stones === 0) {
    return <ellipse cx="0" cy="3" rx="6.5" ry="3" fill={ground} stroke={colour} strokeDasharray="2.5 1.8" />;
  }
  return (
    <g fill={colour} stroke={ground} strokeWidth="1">
      {Array.from({ length: stones }, (_, index) => {
        const fromBottom = stones - 1 - index;
        const lean = LEAN[fromBottom % LEAN.length];
        return (
          <path
            // biome-ignore lint/suspicious/noArrayIndexKey: stones are told apart by their place only
            key={index}
            d={stone(lean, index * STONE_HEIGHT_PX, WIDTHS[fromBottom] ?? 4)}
          />
        );
      })}
    </g>
  );
}

/** Half widths from the bottom stone up, and how far each sits off the middle. */
const WIDTHS = [8.5, 7.2, 6, 4.9, 3.8];
const LEAN = [0, 0.9, -0.8, 0.6, -0.4];

/** A stone with a flat belly and a rounder back. */
function stone(x: number, y: number, half: number): string {
  const h = STONE_HEIGHT_PX;
  const n = (value: number) => round(value, 1);
  return [
    `M${n(x - half)} ${n(y + h * 0.62)}`,
    `C${n(x - half)} ${n(y + h * 0.1)} ${n(x - half * 0.5)} ${n(y)} ${n(x + half * 0.1)} ${n(y)}`,
    `S${n(x + half)} ${n(y + h * 0.25)} ${n(x + half)} ${n(y + h * 0.6)}`,
    `S${n(x + half * 0.5)} ${n(y + h)} ${n(x)} ${n(y + h)}`,
    `S${n(x - half)} ${n(y + h)} ${n(x - half)} ${n(y + h * 0.62)}Z`,
  ].join("");
}
