import { memo } from "react";
import type { StripScene } from "./strip-scene";

export interface StripHrefs {
  stripHref: (stripId: string) => string;
  stepHref: (stepId: string) => string;
}

/** The captions in the ground of each strip and the steps written between them, newest first, as one list to read. */
export const StripWords = memo(function StripWords({
  scene,
  topPx,
  stripHref,
  stepHref,
}: StripHrefs & { scene: StripScene; topPx: number }) {
  const rows = [
    ...scene.strips.map((strip) => ({ y: strip.landY, strip, steps: null })),
    ...scene.steps.map((steps) => ({ y: steps.y, strip: null, steps })),
  ].sort((a, b) => a.y - b.y);
  return (
    <ol className="strip-map-words" style={{ top: topPx }}>
      {rows.map(({ strip, steps }) =>
        strip ? (
          <li key={strip.id} className="strip-caption" style={{ top: strip.footY - CAPTION_PX }}>
            <span className="number">{strip.caption}</span> <a href={stripHref(strip.id)}>{strip.title}</a>
          </li>
        ) : (
          <li
            key={`steps ${steps.y}`}
            className={steps.planned ? "strip-steps strip-planned" : "strip-steps"}
            style={{ top: steps.y, height: steps.heightPx }}
          >
            {steps.steps.map((step) => (
              <span key={step.id} className="strip-step">
                <span className="number">{step.planned ? "planned" : step.caption}</span>{" "}
                <a href={stepHref(step.id)}>{step.title}</a>
              </span>
            ))}
          </li>
        ),
      )}
    </ol>
  );
});

/** Height of a caption's line over the strip's foot. */
const CAPTION_PX = 20;
