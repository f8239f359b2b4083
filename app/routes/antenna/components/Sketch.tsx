import "../antenna.css";
import { sketchOf } from "~/charts/antenna-sketch";
import type { Antenna, AntennaElement } from "~/measurement/antenna";
import { formatLength, type LengthUnit } from "~/measurement/lengths";
import { elementName, KIND_WORDS } from "~/services/antenna-words";

/** The conductors side by side at one scale; what is not known is dashed and said. */
export function Sketch({ antenna, unit }: { antenna: Antenna; unit: LengthUnit }) {
  const sketch = sketchOf(antenna);
  if (!sketch) return null;
  const { slots, heightPx, groundY, scale } = sketch;
  const unsaid = slots.some(({ dashed }) => dashed);
  return (
    <figure className="grid gap-2 min-w-0">
      <div className="sketch">
        {slots.map((slot, i) => (
          <div key={slot.key} className="sketch-slot" style={{ flexBasis: slot.widthPx }}>
            <svg width={slot.widthPx} height={heightPx} aria-hidden="true">
              <g
                fill="none"
                stroke={slot.meant ? "var(--color-ink)" : "var(--color-edge)"}
                strokeWidth={slot.flat ? 4 : slot.meant ? 2 : 1.6}
                strokeLinecap="round"
              >
                <path d={slot.path} strokeDasharray={slot.dashed ? "3 5" : undefined} />
              </g>
              {slot.feed && (
                <circle
                  cx={slot.feed.x}
                  cy={slot.feed.y}
                  r="3.5"
                  fill="var(--color-paper)"
                  stroke="var(--color-fen)"
                  strokeWidth="2"
                />
              )}
            </svg>
            <span className="sketch-ground" style={{ top: groundY }} />
            <p className="text-small">{captionOf(antenna.elements[i], antenna, unit)}</p>
          </div>
        ))}
      </div>
      <figcaption className="text-small soft max-w-[72ch]">
        {scale && (
          <svg width={scale.px + 2} height="9" aria-hidden="true" className="inline-block mr-2">
            <path d={`M1 1v6h${scale.px}v-6`} fill="none" stroke="var(--color-soft)" strokeWidth="1.4" />
          </svg>
        )}
        {scale
          ? `${formatLength(scale.metres, unit)}. From the numbers, to scale; side by side, not where they stand.`
          : "No length is said yet, so nothing is to scale."}
        {unsaid && scale && " Dashed: its length is not said."}
        {slots.some(({ heightGuessed }) => heightGuessed) && " Where a height is not said, it is guessed."}
        {slots.some(({ feed }) => feed) && " A ring marks the feed."}
      </figcaption>
    </figure>
  );
}

function captionOf(element: AntennaElement, antenna: Antenna, unit: LengthUnit) {
  return (
    <>
      <span className="font-semibold">{elementName(element.key, antenna)}</span>
      {element.count > 1 && <span className="number"> ×{element.count}</span>}
      <span className="block soft">
        {element.name ? `${KIND_WORDS[element.kind]}, ` : ""}
        {element.lengthM === null ? (
          "length not said"
        ) : (
          <span className="number">{formatLength(element.lengthM, unit)}</span>
        )}
      </span>
    </>
  );
}
