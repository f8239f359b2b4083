import type { ReactNode } from "react";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField, type InputFieldProps, SelectField } from "~/components/ui/Field";
import type { AxisSource, PictureNotes } from "~/readers/reading";
import type { SeenPicture } from "~/services/seen-picture";
import { CORNER_FIELDS, CORNERS, type PictureErrors, type PictureFields } from "../../picture.schema";
import { TraceChoice } from "./TraceChoice";
import { ZeroLine, type ZeroLineChoice } from "./ZeroLine";

export interface PictureFormProps {
  fields: PictureFields;
  /** As the stored reading has them. */
  first: PictureFields;
  sources: PictureNotes["sources"];
  seen: SeenPicture | null;
  errors: PictureErrors;
  zeroLines: ZeroLineChoice[];
  mayEdit: boolean;
  busy: boolean;
  /** The field that is missing and takes the focus. */
  missing: keyof PictureFields | null;
  set: (fields: Partial<PictureFields>, about: string) => void;
  undo: (() => void) | null;
  print: () => void;
}

/** The axes with where each value came from, the trace, the 0 dB line and what is left out: a plain form. */
export function PictureForm(props: PictureFormProps) {
  const { fields, first, sources, errors, mayEdit, missing, set, undo, print, busy } = props;
  const navigation = useNavigation();
  const input = (name: keyof PictureFields): Partial<InputFieldProps> => ({
    name,
    value: fields[name],
    errors: errors[name] ? [errors[name]] : undefined,
    autoFocus: missing === name,
    autoComplete: "off",
    onChange: (event) => set({ [name]: event.target.value }, name),
  });
  const choice = (name: keyof PictureFields) => ({
    name,
    value: fields[name],
    autoFocus: missing === name,
    onChange: (event: { target: { value: string } }) => set({ [name]: event.target.value }, name),
  });
  const from = (field: keyof PictureFields, key: keyof NonNullable<PictureNotes["sources"]>) =>
    sourceWords(fields[field] !== first[field] ? "given" : sources?.[key], fields[field]);
  const decibels = fields.quantity === "swr" ? undefined : "dB";
  return (
    <Form method="post" className="panel grid gap-5" aria-label="How the picture is read">
      <fieldset disabled={!mayEdit} className="grid gap-5 min-w-0">
        <Group legend="Axes">
          <InputField
            label="Left line"
            hint={from("start", "startHz")}
            inputMode="decimal"
            {...input("start")}
          />
          <InputField
            label="Right line"
            hint={from("stop", "stopHz")}
            inputMode="decimal"
            {...input("stop")}
          />
          <SelectField
            label="Frequencies in"
            options={plain(["Hz", "kHz", "MHz", "GHz"])}
            {...choice("unit")}
          />
          <SelectField
            label="Frequency axis"
            hint={from("scale", "scale")}
            options={[
              { value: "linear", label: "linear" },
              { value: "log", label: "logarithmic" },
            ]}
            {...choice("scale")}
          />
          <SelectField
            label="Shows"
            hint={from("quantity", "quantity")}
            options={QUANTITIES}
            {...choice("quantity")}
          />
          <InputField label="Reference impedance" inputMode="decimal" unit="Ω" {...input("referenceOhm")} />
          <InputField
            label="Top line"
            hint={from("top", "top")}
            inputMode="text"
            unit={decibels}
            {...input("top")}
          />
          <InputField
            label="Bottom line"
            hint={from("bottom", "bottom")}
            inputMode="text"
            unit={decibels}
            {...input("bottom")}
          />
          <div className="sm:col-span-2 grid gap-1 justify-items-start script-only">
            <Button type="button" variant="quiet" size="small" busy={busy} onClick={print}>
              Read the axes from the print
            </Button>
          </div>
        </Group>
        <TraceChoice {...props} name="traceColor" legend="Trace" autoFocus={missing === "traceColor"} />
        {fields.quantity === "level" && <ZeroLine {...props} input={input} />}
        <SelectField
          label="The plot is seen"
          options={[
            { value: "straight", label: "straight on, as in a screenshot" },
            { value: "angle", label: "at an angle, as in a photograph" },
          ]}
          {...choice("seenAs")}
        />
        <details open={fields.masked !== "" || undefined}>
          <summary>Stretches left out</summary>
          <div className="grid gap-2 pt-3">
            <label htmlFor="masked" className="text-small">
              One a line: first and last column; with top and bottom row only that box is passed over.
            </label>
            <textarea id="masked" rows={3} className="control font-mono" {...choice("masked")} />
            {errors.masked && <p className="field-error">{errors.masked}</p>}
          </div>
        </details>
        <details open={missing === "x0" || fields.seenAs === "angle" || undefined}>
          <summary>Corners of the plot</summary>
          <div className="grid gap-3 pt-3">
            <div className="grid grid-cols-2 gap-3">
              {CORNER_FIELDS.map((name, i) => (
                <InputField
                  key={name}
                  label={`${CORNERS[i >> 1]}, ${i % 2 ? "row" : "column"}`}
                  inputMode="decimal"
                  {...input(name)}
                  autoFocus={false}
                />
              ))}
            </div>
          </div>
        </details>
      </fieldset>
      {mayEdit ? (
        <div className="flex flex-wrap gap-3">
          <Button name="intent" value="read" busy={navigation.state === "submitting"}>
            Read it so
          </Button>
          <Button
            type="button"
            variant="quiet"
            className="script-only"
            disabled={!undo}
            onClick={() => undo?.()}
          >
            Undo
          </Button>
          <Button name="intent" value="afresh" variant="quiet" formNoValidate>
            Find it out afresh
          </Button>
        </div>
      ) : (
        <p className="text-small soft">Owners and experimenters of the project can change the reading.</p>
      )}
    </Form>
  );
}

function Group({ legend, children }: { legend: string; children: ReactNode }) {
  return (
    <fieldset className="field-group min-w-0">
      <legend>{legend}</legend>
      <div className="grid items-start gap-x-4 gap-y-3 sm:grid-cols-2">{children}</div>
    </fieldset>
  );
}

function sourceWords(source: AxisSource | undefined, value: string): ReactNode {
  if (value === "") return <span className="text-clay">not found: give it</span>;
  if (source === "printed") return "printed in the picture";
  if (source === "given") return "given by hand";
  return <span className="text-clay">assumed</span>;
}

const QUANTITIES = [
  { value: "s11-db", label: "S11 in dB" },
  { value: "return-loss", label: "Return loss in dB" },
  { value: "swr", label: "SWR" },
  { value: "level", label: "Raw level in dB" },
];

function plain(values: string[]) {
  return values.map((value) => ({ value, label: value }));
}
