import { Button } from "~/components/ui/Button";
import { InputField, type InputFieldProps } from "~/components/ui/Field";
import type { SeenPicture } from "~/services/seen-picture";
import type { PictureErrors, PictureFields } from "../../picture.schema";
import { TraceChoice } from "./TraceChoice";

export interface ZeroLineChoice {
  title: string;
  publicId: string;
  zeroDb: number | null;
}

interface ZeroLineProps {
  fields: PictureFields;
  seen: SeenPicture | null;
  errors: PictureErrors;
  zeroLines: ZeroLineChoice[];
  set: (fields: Partial<PictureFields>, about: string) => void;
  input: (name: keyof PictureFields) => Partial<InputFieldProps>;
}

/** Which level is full reflection: asked once, and remembered for pictures of the same screen in this project. */
export function ZeroLine(props: ZeroLineProps) {
  const { fields, seen, zeroLines, set, input } = props;
  const crest = seen?.crest ?? null;
  return (
    <fieldset className="field-group min-w-0">
      <legend>0 dB line</legend>
      <p className="text-small soft">
        The level at which everything comes back, as with the far end open. It is remembered for pictures of
        this screen in the project.
      </p>
      <div className="grid gap-2 pt-1">
        {WAYS.map(({ value, word }) => (
          <label key={value} className="flex items-center gap-2">
            <input
              type="radio"
              name="zeroFrom"
              value={value}
              checked={fields.zeroFrom === value}
              onChange={() => set({ zeroFrom: value }, "zeroFrom")}
            />
            {word}
            {value === "crest" && crest !== null && (
              <span className="soft font-mono">{crest.toFixed(1)} dB</span>
            )}
          </label>
        ))}
        {fields.zeroFrom === "number" && (
          <InputField label="Level" unit="dB" inputMode="text" {...input("zeroDb")} />
        )}
        {fields.zeroFrom === "trace" && (
          <TraceChoice {...props} name="zeroTrace" legend="The trace that is 0 dB" />
        )}
        {zeroLines.length > 0 && (
          <div className="flex flex-wrap gap-2 script-only">
            {zeroLines.map(({ publicId, title, zeroDb }) => (
              <Button
                key={publicId}
                type="button"
                variant="quiet"
                size="small"
                onClick={() => set({ zeroFrom: "number", zeroDb: String(zeroDb) }, `zero-${publicId}`)}
              >
                As in “{title}”: {zeroDb} dB
              </Button>
            ))}
          </div>
        )}
      </div>
    </fieldset>
  );
}

const WAYS = [
  { value: "number", word: "A level" },
  { value: "crest", word: "The crest of this sweep" },
  { value: "trace", word: "A second trace in this picture" },
];
