import { useEffect, useState } from "react";
import { Link } from "react-router";
import { RegionMarks } from "~/components/notes/PartMarks";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";
import type { SweepPageData } from "../../sweep-page.server";
import { searchWith } from "../../sweeps.schema";
import { roughFrequency } from "../../words";

/** Rows of the picture shown over and under the plot. */
const AROUND = 6;

/** The picture under the curve at the same horizontal scale; one key lays the curve that was read over it. */
export function PictureBeside({ data }: { data: SweepPageData }) {
  const { picture, project, sweep, view } = data;
  const [over, setOver] = useState(false);
  const hydrated = useHydrated();
  useEffect(() => {
    if (!picture) return;
    const onKeyDown = (event: KeyboardEvent) => {
      const target = event.target as HTMLElement | null;
      const writes = target?.closest("input, textarea, select, [contenteditable]");
      if (event.key !== "p" || writes || event.ctrlKey || event.metaKey || event.altKey) return;
      setOver((was) => !was);
    };
    window.addEventListener("keydown", onKeyDown);
    return () => window.removeEventListener("keydown", onKeyDown);
  }, [picture]);
  if (!picture) return null;
  const src = `/projects/${project.publicId}/sweeps/${sweep.publicId}/picture${picture.flat ? "?flat" : ""}`;
  return (
    <section aria-labelledby="picture" className="grid gap-2">
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
        <h2 id="picture" className="text-base">
          The picture
        </h2>
        {hydrated && (
          <Button
            type="button"
            variant="quiet"
            size="small"
            aria-pressed={over}
            aria-keyshortcuts="p"
            onClick={() => setOver(!over)}
          >
            {over ? "Take the curve off" : "Lay the curve over it"} (p)
          </Button>
        )}
      </div>
      {picture.scale === view.scale ? (
        <Strip picture={picture} src={src} over={over} />
      ) : (
        <p className="text-small">
          Its frequency axis is {picture.scale === "log" ? "logarithmic" : "linear"}:{" "}
          <Link to={searchWith(view, { scale: picture.scale }) || "?"} replace preventScrollReset>
            draw the curve so
          </Link>{" "}
          to see both at one scale.
        </p>
      )}
      <p className="text-small soft">
        Read from a picture: half a pixel is{" "}
        <span className="font-mono">{roughFrequency(picture.halfColumnHz)}</span> across and{" "}
        <span className="font-mono">
          {Number(picture.halfRow.toPrecision(2))} {picture.unit}
        </span>{" "}
        up and down. The band around the curve shows it, with the thickness of the trace.
      </p>
      <p role="status" className="sr-only">
        {over ? "The curve that was read lies over the picture." : ""}
      </p>
    </section>
  );
}

interface StripProps {
  picture: NonNullable<SweepPageData["picture"]>;
  src: string;
  over: boolean;
}

function Strip({ picture, src, over }: StripProps) {
  const { frame, fromX, toX, width, height, line } = picture;
  const top = Math.max(0, frame.top - AROUND);
  const across = toX - fromX;
  const down = Math.min(height, frame.bottom + AROUND) - top;
  const share = (pixels: number, of: number) => `${(pixels / of) * 100}%`;
  return (
    <div className="chart">
      <div className="picture-strip" style={{ aspectRatio: `${across} / ${down}` }}>
        <img
          src={src}
          alt={over ? "The plot with the curve that was read laid over it" : "The plot as it was given"}
          loading="lazy"
          style={{
            left: share(-(fromX + 0.5), across),
            top: share(-top, down),
            width: share(width, across),
            height: share(height, down),
          }}
        />
        <div
          className="absolute"
          style={{
            left: share(-(fromX + 0.5), across),
            top: share(-top, down),
            width: share(width, across),
            height: share(height, down),
          }}
        >
          <RegionMarks />
        </div>
        {over && (
          <svg
            viewBox={`${fromX} ${top - 0.5} ${across} ${down}`}
            preserveAspectRatio="none"
            aria-hidden="true"
          >
            {line.map((piece) => (
              <polyline
                key={piece[0].x}
                className="board-line"
                points={piece.map(({ x, y }) => `${x},${y}`).join(" ")}
              />
            ))}
          </svg>
        )}
      </div>
    </div>
  );
}
