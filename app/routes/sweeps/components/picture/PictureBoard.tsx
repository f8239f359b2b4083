import { type PointerEvent, useRef, useState } from "react";
import { useHydrated } from "~/components/ui/hydrated";
import type { PicturePoint } from "~/readers/reading";
import type { SeenPicture } from "~/services/seen-picture";
import { type PictureFields, stretchesIn, stretchText } from "../../picture.schema";
import { CornerHandles } from "./CornerHandles";
import { cornersIn, plotOf, stretchDrawn, stretchOutline, withCorner } from "./corners";
import { pickColour } from "./pick-colour";

const TOOLS = [
  {
    id: "corners",
    word: "Move corners",
    hint: "Drag a corner, or focus it and use the arrow keys: one pixel, with shift ten.",
  },
  {
    id: "colour",
    word: "Pick the trace",
    hint: "Press on the trace that is the sweep: its colour is followed.",
  },
  {
    id: "columns",
    word: "Leave columns out",
    hint: "Draw across a stretch that was misread: it becomes a gap.",
  },
  {
    id: "box",
    word: "Paint a box away",
    hint: "Draw a box over ink that is not the trace: it is passed over.",
  },
] as const;
type Tool = (typeof TOOLS)[number]["id"];

interface PictureBoardProps {
  src: string;
  seen: SeenPicture;
  fields: PictureFields;
  mayEdit: boolean;
  cornersFirst: boolean;
  set: (fields: Partial<PictureFields>, about: string) => void;
}

/** The picture with the plot's corners, the trace as it was followed and what is left out; and the tools for them. */
export function PictureBoard({ src, seen, fields, mayEdit, cornersFirst, set }: PictureBoardProps) {
  const [tool, setTool] = useState<Tool>("corners");
  const [large, setLarge] = useState(false);
  const [drawn, setDrawn] = useState<[PicturePoint, PicturePoint] | null>(null);
  const board = useRef<HTMLDivElement>(null);
  const image = useRef<HTMLImageElement>(null);
  const live = useHydrated() && mayEdit;
  const { width, height } = seen;
  const corners = cornersIn(fields, seen);
  const plot = plotOf(fields, seen);
  const found = fields.x0 !== "";
  const placeOf = ({ clientX, clientY }: { clientX: number; clientY: number }) => {
    const box = board.current?.getBoundingClientRect();
    if (!box) return { x: 0, y: 0 };
    return {
      x: ((clientX - box.left) / box.width) * width - 0.5,
      y: ((clientY - box.top) / box.height) * height - 0.5,
    };
  };
  const draws = tool === "columns" || tool === "box";
  const onPointerDown = (event: PointerEvent<HTMLDivElement>) => {
    if (!live || event.button !== 0) return;
    const at = placeOf(event);
    if (tool === "colour" && image.current) {
      const hex = pickColour(image.current, at);
      if (hex) set({ traceColor: hex }, `pick-${hex}`);
    }
    if (!draws) return;
    event.preventDefault();
    event.currentTarget.setPointerCapture(event.pointerId);
    setDrawn([at, at]);
  };
  const onPointerUp = () => {
    if (!drawn) return;
    const [a, b] = drawn;
    setDrawn(null);
    if (Math.abs(a.x - b.x) < 1) return;
    const line = stretchText(stretchDrawn(a, b, plot, tool === "box"));
    set({ masked: [fields.masked.trim(), line].filter(Boolean).join("\n") }, `mask-${line}`);
  };
  return (
    <div className="grid gap-2 min-w-0">
      {live && (
        <div className="flex flex-wrap items-center gap-2">
          <fieldset className="tool-bar">
            <legend className="sr-only">What the pointer does in the picture</legend>
            {TOOLS.map(({ id, word }) => (
              <button key={id} type="button" aria-pressed={tool === id} onClick={() => setTool(id)}>
                {word}
              </button>
            ))}
          </fieldset>
          <button type="button" className="tool-alone" aria-pressed={large} onClick={() => setLarge(!large)}>
            Full size
          </button>
        </div>
      )}
      {live && <p className="text-small soft">{TOOLS.find(({ id }) => id === tool)?.hint}</p>}
      <section className="picture-frame" tabIndex={large ? 0 : undefined} aria-label="The picture">
        <div
          ref={board}
          className={`picture-board ${draws ? "picture-board-draw" : ""} ${tool === "colour" ? "picture-board-pick" : ""}`}
          style={large ? { width, maxWidth: "none" } : { maxWidth: Math.max(width, 640) }}
          onPointerDown={onPointerDown}
          onPointerMove={(event) => drawn && setDrawn([drawn[0], placeOf(event)])}
          onPointerUp={onPointerUp}
          onPointerCancel={() => setDrawn(null)}
        >
          <img
            ref={image}
            src={src}
            width={width}
            height={height}
            alt="What was given, upright"
            draggable={false}
          />
          <svg viewBox={`-0.5 -0.5 ${width} ${height}`} preserveAspectRatio="none" aria-hidden="true">
            {stretchesIn(fields.masked).map((stretch) => (
              <polygon
                key={stretchText(stretch)}
                className="board-mask"
                points={stretchOutline(stretch, corners, plot)}
              />
            ))}
            {drawn && (
              <polygon
                className="board-mask"
                points={stretchOutline(stretchDrawn(drawn[0], drawn[1], plot, tool === "box"), corners, plot)}
              />
            )}
            <polygon
              className={found ? "board-frame" : "board-frame board-frame-unset"}
              points={corners.map(({ x, y }) => `${x},${y}`).join(" ")}
            />
            {seen.line.map((piece) => (
              <polyline
                key={piece[0].x}
                className="board-line"
                points={piece.map(({ x, y }) => `${x},${y}`).join(" ")}
              />
            ))}
          </svg>
          {live && tool === "corners" && (
            <CornerHandles
              size={seen}
              corners={corners}
              focusFirst={cornersFirst}
              placeOf={placeOf}
              onMove={(index, to, about) => set(withCorner(fields, seen, index, to), about)}
            />
          )}
        </div>
      </section>
      {!found && live && (
        <p className="text-small text-clay">
          No plot was found. Bring the four corners onto the plot’s own corners.
        </p>
      )}
    </div>
  );
}
