import { type PointerEvent, useState } from "react";
import type { FrequencyScale } from "./axis";
import type { FrequencyRange } from "./ranges";

export interface StripDragProps {
  scale: FrequencyScale;
  /** Called when a stretch was drawn across the map. */
  onRange: (range: FrequencyRange) => void;
}

interface Drag {
  from: number;
  to: number;
}

/** With a mouse: a stretch drawn across the map is looked at closer. Touch scrolls the page; the buttons zoom there. */
export function StripDrag({ scale, onRange }: StripDragProps) {
  const [drag, setDrag] = useState<Drag | null>(null);
  const [low, high] = drag ? [Math.min(drag.from, drag.to), Math.max(drag.from, drag.to)] : [0, 0];
  const begin = (event: PointerEvent<HTMLDivElement>) => {
    if (event.pointerType !== "mouse" || event.button !== 0) return;
    event.preventDefault();
    event.currentTarget.setPointerCapture(event.pointerId);
    setDrag({ from: fractionOf(event), to: fractionOf(event) });
  };
  const end = () => {
    setDrag(null);
    if (high - low >= SMALLEST_SHARE) onRange({ fromHz: scale.hzAt(low), toHz: scale.hzAt(high) });
  };
  return (
    <div
      className="strip-drag"
      aria-hidden="true"
      onPointerDown={begin}
      onPointerMove={(event) => drag && setDrag({ ...drag, to: fractionOf(event) })}
      onPointerUp={end}
      onPointerCancel={() => setDrag(null)}
    >
      {drag && high > low && (
        <div className="strip-drawn" style={{ left: `${low * 100}%`, width: `${(high - low) * 100}%` }} />
      )}
    </div>
  );
}

function fractionOf(event: PointerEvent<HTMLDivElement>): number {
  const { left, width } = event.currentTarget.getBoundingClientRect();
  return Math.min(1, Math.max(0, (event.clientX - left) / width));
}

/** A shorter stretch is a slip of the hand. */
const SMALLEST_SHARE = 0.01;
