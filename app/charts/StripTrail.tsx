import { type FocusEvent, type KeyboardEvent, memo } from "react";
import { PAGE_PALETTE } from "./palette";
import { At, across, round, Stretched } from "./place";
import type { PlacedTrail } from "./placed-trail";
import { TRAIL_UNITS } from "./strip-trails";

export interface StripTrailProps {
  placed: PlacedTrail;
  heightPx: number;
  /** Its numbers are written beside its stops. */
  active: boolean;
  onActive?: (trailId: string | null) => void;
  trailHref: (trailId: string) => string;
  dipHref: (dipId: string) => string;
}

const palette = PAGE_PALETTE;

/**
 * One dip followed from strip to strip. The line is a link to the trail; each stop is one to its dip, reached from the
 * line with the arrow keys: a hundred sweeps are not a thousand presses of Tab. All dots are one path, and a trail is drawn
 * again only when something of its own changes: there are a thousand stops.
 */
export const StripTrail = memo(function StripTrail(props: StripTrailProps) {
  const { placed, heightPx, active, onActive, trailHref, dipHref } = props;
  const { id, stops, tone, label, detail } = placed;
  const newest = stops[0];
  if (!newest) return null;
  const colour = palette[tone];
  const dots = stops.map(({ fraction, y }) => `M${round(fraction * TRAIL_UNITS, 1)} ${y}h.1`).join("");
  const words = [`Trail ${label}`, detail, countOf(stops.length)].filter(Boolean).join(", ");
  const leave = (event: FocusEvent) => {
    if (!event.currentTarget.contains(event.relatedTarget)) onActive?.(null);
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: its links are what is pressed; the arrow keys go between them
    <g
      className={active ? "trail trail-active" : "trail"}
      data-tone={tone}
      color={colour}
      onPointerEnter={(event) => event.pointerType === "mouse" && onActive?.(id)}
      onPointerLeave={(event) => event.pointerType === "mouse" && onActive?.(null)}
      onFocus={() => onActive?.(id)}
      onBlur={leave}
      onKeyDown={walk}
    >
      <a href={trailHref(id)} className="trail-way" aria-label={words}>
        <Stretched width={TRAIL_UNITS} height={heightPx} plotWidthPx={null}>
          <path
            d={placed.way + placed.gaps || `M${newest.fraction * TRAIL_UNITS} ${newest.y}h.1`}
            className="trail-reach"
          />
          {placed.way && <path d={placed.way} className="trail-line" stroke={colour} />}
          {placed.gaps && <path d={placed.gaps} className="trail-line trail-gap" stroke={colour} />}
          {placed.ahead && <path d={placed.ahead} className="trail-line trail-gap" stroke={colour} />}
          <path d={dots} className="trail-dots" />
          <path d={dots} className="trail-dots trail-dots-inside" />
        </Stretched>
      </a>
      {stops.map((stop) => (
        <a
          key={stop.dipId}
          href={dipHref(stop.dipId)}
          className="trail-stop"
          tabIndex={-1}
          aria-label={stop.words}
        >
          <circle cx={across(stop.fraction, null)} cy={stop.y} r="10" />
        </a>
      ))}
      {active ? (
        <StopWords placed={placed} colour={colour} />
      ) : (
        <TrailLabel placed={placed} colour={colour} />
      )}
    </g>
  );
});

function TrailLabel({ placed, colour }: { placed: PlacedTrail; colour: string }) {
  const { name, label, detail, stops } = placed;
  if (!name) return null;
  return (
    <At fraction={stops[0].fraction} y={stops[0].y} plotWidthPx={null} className={tierClass(name.tier)}>
      <text
        className="strip-label"
        x={name.side === "left" ? -11 : 11}
        y={name.shiftY + 4}
        textAnchor={name.side === "left" ? "end" : "start"}
        fill={colour}
      >
        {label}
        {name.detailTier !== null && <tspan className={tierClass(name.detailTier)}>{`, ${detail}`}</tspan>}
      </text>
    </At>
  );
}

/** Frequency and SWR along the way. */
function StopWords({ placed, colour }: { placed: PlacedTrail; colour: string }) {
  return placed.stops.map((stop) => {
    const left = stop.fraction > SIDE_FRACTION;
    return (
      <At key={stop.dipId} fraction={stop.fraction} y={stop.y} plotWidthPx={null}>
        <text
          className="strip-label"
          x={left ? -11 : 11}
          y={4}
          textAnchor={left ? "end" : "start"}
          fill={colour}
        >
          {stop.words.split(",").slice(0, 2).join(",")}
        </text>
      </At>
    );
  });
}

/** Up and down go along the trail, from the line to its newest stop and back. */
function walk(event: KeyboardEvent<SVGGElement>) {
  const step = event.key === "ArrowDown" ? 1 : event.key === "ArrowUp" ? -1 : 0;
  if (step === 0) return;
  const links = [...event.currentTarget.querySelectorAll<SVGAElement>("a")];
  const next = links[links.indexOf(document.activeElement as unknown as SVGAElement) + step];
  if (!next) return;
  event.preventDefault();
  next.focus();
}

function tierClass(tier: number): string | undefined {
  return tier > 0 ? `tier-${tier}` : undefined;
}

function countOf(stops: number): string {
  return stops === 1 ? "in one sweep" : `in ${stops} sweeps`;
}

/** Right of this there is no room for words on the right. */
const SIDE_FRACTION = 0.62;
