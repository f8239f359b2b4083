import { type KeyboardEvent, type PointerEvent, useEffect, useRef } from "react";
import type { PicturePoint } from "~/readers/reading";
import { CORNERS } from "../../picture.schema";
import type { Size } from "./corners";

interface CornerHandlesProps {
  size: Size;
  corners: PicturePoint[];
  /** Takes the focus at first: the corners are what is missing. */
  focusFirst: boolean;
  /** From a pointer to pixels of the picture. */
  placeOf: (event: { clientX: number; clientY: number }) => PicturePoint;
  onMove: (index: number, to: PicturePoint, about: string) => void;
}

/** The plot's corners: dragged, or focused and moved by the arrow keys, one pixel or with shift ten. */
export function CornerHandles({ size, corners, focusFirst, placeOf, onMove }: CornerHandlesProps) {
  const first = useRef<HTMLButtonElement>(null);
  const drag = useRef<{ id: number; dx: number; dy: number } | null>(null);
  const drags = useRef(0);
  useEffect(() => {
    if (focusFirst) first.current?.focus();
  }, [focusFirst]);

  const onKeyDown = (event: KeyboardEvent, index: number) => {
    const step = STEPS[event.key];
    if (!step || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    const far = event.shiftKey ? 10 : 1;
    const { x, y } = corners[index];
    onMove(index, { x: x + step[0] * far, y: y + step[1] * far }, `corner-${index}`);
  };
  const onPointerDown = (event: PointerEvent<HTMLButtonElement>, index: number) => {
    event.currentTarget.setPointerCapture(event.pointerId);
    const at = placeOf(event);
    drag.current = { id: index, dx: corners[index].x - at.x, dy: corners[index].y - at.y };
    drags.current += 1;
  };
  const onPointerMove = (event: PointerEvent, index: number) => {
    if (drag.current?.id !== index) return;
    const at = placeOf(event);
    const to = { x: at.x + drag.current.dx, y: at.y + drag.current.dy };
    onMove(index, to, `drag-${drags.current}`);
  };
  const letGo = () => {
    drag.current = null;
  };
  return corners.map(({ x, y }, index) => (
    <button
      key={CORNERS[index]}
      ref={index === 0 ? first : undefined}
      type="button"
      className="corner-handle"
      style={{ left: `${((x + 0.5) / size.width) * 100}%`, top: `${((y + 0.5) / size.height) * 100}%` }}
      aria-label={`${CORNERS[index]} corner of the plot, column ${Math.round(x)}, row ${Math.round(y)}. Arrow keys move it.`}
      onKeyDown={(event) => onKeyDown(event, index)}
      onPointerDown={(event) => onPointerDown(event, index)}
      onPointerMove={(event) => onPointerMove(event, index)}
      onPointerUp={letGo}
      onPointerCancel={letGo}
    />
  ));
}

const STEPS: Record<string, [number, number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};
