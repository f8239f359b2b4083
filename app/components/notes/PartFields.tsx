import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { useHydrated } from "~/components/ui/hydrated";
import { type Picking, useMarks } from "./marks.tsx";
import { mhzOf, type PartsOffered, percentOf } from "./parts.ts";

/** Says of which part of the sweep a note speaks: by dragging, or in figures. Both are plain fields of the form. */
export function PartFields({ offered }: { offered: PartsOffered }) {
  const marks = useMarks();
  const { stretch, region } = marks?.picked ?? { stretch: null, region: null };
  const key = JSON.stringify([stretch, region]);
  return (
    <details className="min-w-0" open={stretch !== null || region !== null || undefined}>
      <summary className="note-action">On a part of it</summary>
      <div key={key} className="grid gap-3 pt-2">
        <div className="flex flex-wrap items-end gap-3">
          <InputField
            name="fromMhz"
            label="From"
            unit="MHz"
            inputMode="decimal"
            className="part-field"
            placeholder={mhzOf(offered.fromHz)}
            defaultValue={stretch ? mhzOf(stretch.fromHz) : ""}
          />
          <InputField
            name="toMhz"
            label="To"
            unit="MHz"
            inputMode="decimal"
            className="part-field"
            placeholder={mhzOf(offered.toHz)}
            defaultValue={stretch ? mhzOf(stretch.toHz) : ""}
          />
          <PickButton what="stretch" label="Drag on the chart" />
        </div>
        {offered.picture && (
          <div className="flex flex-wrap items-end gap-3">
            {REGION_FIELDS.map(({ name, label, of }) => (
              <InputField
                key={name}
                name={name}
                label={label}
                unit="%"
                inputMode="decimal"
                className="part-field"
                defaultValue={region ? percentOf(region[of]) : ""}
              />
            ))}
            <PickButton what="region" label="Drag on the picture" />
          </div>
        )}
        {(stretch || region) && (
          <div>
            <Button
              type="button"
              variant="quiet"
              size="small"
              onClick={() => marks?.setPicked({ stretch: null, region: null })}
            >
              Speak of all of it
            </Button>
          </div>
        )}
      </div>
    </details>
  );
}

function PickButton({ what, label }: { what: Picking; label: string }) {
  const marks = useMarks();
  if (!useHydrated() || !marks) return null;
  const on = marks.picking === what;
  return (
    <Button
      type="button"
      variant="quiet"
      size="small"
      aria-pressed={on}
      onClick={() => {
        marks.pick(on ? null : what);
        if (!on) document.querySelector(TARGETS[what])?.scrollIntoView({ block: "center" });
      }}
    >
      {on ? "Stop dragging" : label}
    </Button>
  );
}

const TARGETS: Record<Picking, string> = { stretch: ".chart-frame", region: ".picture-strip" };
const REGION_FIELDS = [
  { name: "regionLeft", label: "Left", of: "x" },
  { name: "regionTop", label: "Top", of: "y" },
  { name: "regionWidth", label: "Width", of: "width" },
  { name: "regionHeight", label: "Height", of: "height" },
] as const;
