import type { MouseEvent } from "react";
import { Icon, type IconName } from "~/components/ui/Icon";
import type { FrequencyScaleKind } from "./axis";
import { type FrequencyRange, sameRange, shiftRange, zoomRange } from "./ranges";

export interface RangeBarProps {
  now: FrequencyRange;
  whole: FrequencyRange;
  scale: FrequencyScaleKind;
  /** Zooming keeps this frequency in the middle while it is in view. */
  aroundHz?: number | null;
  /** What it is a stretch of. */
  of?: string;
  rangeHref: (range: FrequencyRange) => string;
  onRange?: (range: FrequencyRange) => void;
}

/** Closer, further, along: links that work without scripts, answered on the spot with them. */
export function RangeBar(props: RangeBarProps) {
  const { now, whole, scale, aroundHz, of = "the sweep", rangeHref, onRange } = props;
  const steps: { label: string; icon: IconName; to: FrequencyRange }[] = [
    { label: "Zoom in", icon: "zoomIn", to: zoomRange(now, whole, scale, 0.5, aroundHz) },
    { label: "Zoom out", icon: "zoomOut", to: zoomRange(now, whole, scale, 2, aroundHz) },
    { label: "Lower frequencies", icon: "back", to: shiftRange(now, whole, scale, -0.5) },
    { label: "Higher frequencies", icon: "forward", to: shiftRange(now, whole, scale, 0.5) },
    { label: of === "the sweep" ? "Whole sweep" : "Everything", icon: "whole", to: whole },
  ];
  return (
    <nav aria-label={`Stretch of ${of}`} className="range-bar">
      {steps.map(({ label, icon, to }) =>
        sameRange(now, to) ? (
          <span key={label} className="range-step range-step-off">
            <Icon name={icon} size={18} />
          </span>
        ) : (
          <a
            key={label}
            href={rangeHref(to)}
            className="range-step"
            aria-label={label}
            title={label}
            onClick={onRange && ((event) => step(event, to, onRange))}
          >
            <Icon name={icon} size={18} />
          </a>
        ),
      )}
    </nav>
  );
}

function step(event: MouseEvent, to: FrequencyRange, onRange: (range: FrequencyRange) => void) {
  if (event.metaKey || event.ctrlKey || event.shiftKey || event.altKey || event.button !== 0) return;
  event.preventDefault();
  onRange(to);
}
