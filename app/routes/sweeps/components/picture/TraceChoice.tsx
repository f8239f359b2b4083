import type { SeenPicture } from "~/services/seen-picture";
import type { PictureErrors, PictureFields } from "../../picture.schema";

interface TraceChoiceProps {
  legend: string;
  name: "traceColor" | "zeroTrace";
  fields: PictureFields;
  seen: SeenPicture | null;
  errors: PictureErrors;
  autoFocus?: boolean;
  set: (fields: Partial<PictureFields>, about: string) => void;
}

/** A trace by its colour: those that were seen, or any other. */
export function TraceChoice({ legend, name, fields, seen, errors, autoFocus, set }: TraceChoiceProps) {
  const chosen = fields[name];
  return (
    <fieldset className="field-group min-w-0">
      <legend>{legend}</legend>
      <div className="flex flex-wrap items-center gap-2 pt-1">
        {seen?.traces.map(({ color, share }) => (
          <button
            key={color}
            type="button"
            className="trace-swatch script-only"
            aria-pressed={color === chosen}
            onClick={() => set({ [name]: color }, `${name}-${color}`)}
          >
            <span style={{ background: color }} aria-hidden="true" />
            {color}
            <span className="soft">, {Math.round(share * 100)} %</span>
          </button>
        ))}
        <label className="trace-other">
          <span className="sr-only">{legend}: colour</span>
          <span className="trace-dot" style={{ background: chosen || "transparent" }} aria-hidden="true" />
          <input
            className="control font-mono"
            name={name}
            value={chosen}
            placeholder="#rrggbb"
            size={9}
            // biome-ignore lint/a11y/noAutofocus: what is missing is in focus, as its page says
            autoFocus={autoFocus}
            autoComplete="off"
            spellCheck={false}
            aria-invalid={errors[name] ? true : undefined}
            onChange={(event) => set({ [name]: event.target.value }, name)}
          />
        </label>
      </div>
      {errors[name] && <p className="field-error">{errors[name]}</p>}
    </fieldset>
  );
}
