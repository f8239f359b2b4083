import { type PointerEvent, useState } from "react";
import { SMALLEST_SHARE } from "~/services/note-parts";
import { useMarks } from "./marks.tsx";
import { type PictureRegion, regionBetween } from "./parts.ts";

/** How the plot lays frequencies out, by shares of its width. */
interface Across {
  hzAt(share: number): number;
  fractionOf(hz: number): number;
}

/** Over the plot of a sweep's chart: the stretch that a note speaks of, and the place to drag a new one. */
export function StretchMarks({ scale }: { scale: Across }) {
  const marks = useMarks();
  if (!marks) return null;
  const { shown, picked, picking, pick, setPicked } = marks;
  const stretch = shown?.stretch ?? picked.stretch;
  return (
    <div className="part-marks" data-picking={picking === "stretch" || undefined}>
      {stretch && <Box region={across(stretch, scale)} />}
      {picking === "stretch" && (
        <Dragging
          label="Drag across the stretch that the note speaks of"
          onDone={({ x, width }) => {
            pick(null);
            if (width < SMALLEST_SHARE) return;
            setPicked({ region: null, stretch: { fromHz: scale.hzAt(x), toHz: scale.hzAt(x + width) } });
          }}
          full
        />
      )}
    </div>
  );
}

/** Over a picture, exactly: the region that a note speaks of, and the place to drag a new one. */
export function RegionMarks() {
  const marks = useMarks();
  if (!marks) return null;
  const { shown, picked, picking, pick, setPicked } = marks;
  const region = shown?.region ?? picked.region;
  return (
    <div className="part-marks" data-picking={picking === "region" || undefined}>
      {region && <Box region={region} />}
      {picking === "region" && (
        <Dragging
          label="Drag over the region that the note speaks of"
          onDone={(chosen) => {
            pick(null);
            if (Math.min(chosen.width, chosen.height) < SMALLEST_SHARE) return;
            setPicked({ stretch: null, region: chosen });
          }}
        />
      )}
    </div>
  );
}

/** Takes one drag; `full`: from top to bottom, wherever it began. */
function Dragging({
  label,
  onDone,
  full,
}: {
  label: string;
  onDone: (region: PictureRegion) => void;
  full?: boolean;
}) {
  const [from, setFrom] = useState<{ x: number; y: number } | null>(null);
  const [now, setNow] = useState<PictureRegion | null>(null);
  const regionTo = (event: PointerEvent<HTMLDivElement>, start: { x: number; y: number }) => {
    const region = regionBetween(start, shareOf(event));
    return full ? { ...region, y: 0, height: 1 } : region;
  };
  return (
    <div
      className="part-drag"
      title={label}
      onPointerDown={(event) => {
        event.preventDefault();
        event.currentTarget.setPointerCapture(event.pointerId);
        setFrom(shareOf(event));
      }}
      onPointerMove={(event) => from && setNow(regionTo(event, from))}
      onPointerUp={(event) => from && onDone(regionTo(event, from))}
      onPointerCancel={() => {
        setFrom(null);
        setNow(null);
      }}
    >
      {now && <Box region={now} />}
    </div>
  );
}

function Box({ region: { x, y, width, height } }: { region: PictureRegion }) {
  const percent = (share: number) => `${share * 100}%`;
  return (
    <div
      className="part-box"
      style={{ left: percent(x), top: percent(y), width: percent(width), height: percent(height) }}
    />
  );
}

/** The stretch as it lies in the view; of no width where it lies outside. */
function across({ fromHz, toHz }: { fromHz: number; toHz: number }, scale: Across): PictureRegion {
  const at = (hz: number) => ({ x: scale.fractionOf(hz), y: 0 });
  return { ...regionBetween(at(fromHz), at(toHz)), height: 1 };
}

function shareOf(event: PointerEvent<HTMLDivElement>): { x: number; y: number } {
  const box = event.currentTarget.getBoundingClientRect();
  return { x: (event.clientX - box.left) / box.width, y: (event.clientY - box.top) / box.height };
}
