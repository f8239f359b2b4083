import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField, SelectField } from "~/components/ui/Field";
import type { Reading, ReadProblem, TextSpec } from "~/readers/reading";
import { nameOf, type ReadingFormErrors } from "../reading.schema";

interface ReadingFormProps {
  /** The reading as resolved: what each field begins with. */
  reading: Reading;
  problem: ReadProblem | null;
  errors: ReadingFormErrors;
  mayEdit: boolean;
  onChange: (form: HTMLFormElement) => void;
}

/** Every choice that the reading rests on; what the file leaves open comes first. */
export function ReadingForm({ reading, problem, errors, mayEdit, onChange }: ReadingFormProps) {
  const navigation = useNavigation();
  return (
    <Form
      method="post"
      className="panel grid gap-5"
      aria-label="How the file is read"
      onChange={(event) => onChange(event.currentTarget)}
    >
      <Questions reading={reading} mayEdit={mayEdit} />
      <fieldset disabled={!mayEdit} className="grid gap-4 min-w-0">
        {reading.format === "text" && reading.spec.text && (
          <TextFields
            spec={reading.spec.text}
            reading={reading}
            errors={errors}
            zeroFirst={problem?.code === "zero-db-needed"}
          />
        )}
        {reading.format === "touchstone" && (
          <SelectField
            label="Reflection"
            name="port"
            defaultValue={String(reading.spec.touchstone?.port ?? 1)}
            options={[
              { value: "1", label: "S11, port 1" },
              { value: "2", label: "S22, port 2" },
            ]}
          />
        )}
      </fieldset>
      {mayEdit ? (
        <div className="flex flex-wrap gap-3">
          <Button name="intent" value="read" busy={navigation.state === "submitting"}>
            Read it so
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

/** What the file leaves open: each choice is one press, and the file is read anew with it. */
function Questions({ reading, mayEdit }: { reading: Reading; mayEdit: boolean }) {
  return reading.questions.map((question) => (
    <fieldset key={question.id} disabled={!mayEdit} className="field-group min-w-0">
      <legend>{question.text}</legend>
      <div className="flex flex-wrap gap-2 pt-1">
        {question.choices.map((choice) => {
          const taken = choice.value === question.proposed;
          return (
            <Button
              key={choice.value}
              variant="quiet"
              size="small"
              icon={taken ? "check" : undefined}
              name="answer"
              value={`${question.id}=${choice.value}`}
              aria-pressed={taken}
              formNoValidate
            >
              {choice.label}
            </Button>
          );
        })}
      </div>
    </fieldset>
  ));
}

interface TextFieldsProps {
  spec: Partial<TextSpec>;
  reading: Reading;
  errors: ReadingFormErrors;
  zeroFirst: boolean;
}

function TextFields({ spec, reading, errors, zeroFirst }: TextFieldsProps) {
  const width = Math.max(
    reading.preview?.headings.length ?? 0,
    ...(reading.preview?.rows.map((row) => row.length) ?? []),
    (spec.valueColumn ?? 0) + 1,
  );
  const columns = Array.from({ length: width }, (_, i) => ({
    value: String(i + 1),
    label: `${i + 1}${reading.preview?.headings[i] ? ` · ${reading.preview.headings[i]}` : ""}`,
  }));
  const fault = (name: string) => (errors[name] ? [errors[name]] : undefined);
  return (
    <>
      <div className="grid items-start gap-4 sm:grid-cols-2">
        <SelectField
          label="Quantity"
          name="quantity"
          defaultValue={spec.quantity}
          options={QUANTITIES}
          errors={fault("quantity")}
        />
        <div className="for-level">
          <InputField
            label="0 dB line"
            hint="Only for raw levels: the level of full reflection."
            name="zeroDb"
            inputMode="decimal"
            unit="dB"
            autoFocus={zeroFirst}
            defaultValue={spec.zeroDb ?? ""}
            errors={fault("zeroDb")}
          />
        </div>
        <SelectField
          label="Frequency column"
          name="frequencyColumn"
          defaultValue={String((spec.frequencyColumn ?? 0) + 1)}
          options={columns}
        />
        <SelectField
          label="Frequency unit"
          name="frequencyUnit"
          defaultValue={spec.frequencyUnit}
          options={plain(["Hz", "kHz", "MHz", "GHz"])}
        />
        <SelectField
          label="Value column"
          name="valueColumn"
          defaultValue={String((spec.valueColumn ?? 1) + 1)}
          options={columns}
        />
        <div className="for-pairs">
          <SelectField
            label="Second column"
            hint="Angle, imaginary part or reactance."
            name="secondColumn"
            defaultValue={
              spec.secondColumn === null || spec.secondColumn === undefined
                ? "none"
                : String(spec.secondColumn + 1)
            }
            options={[{ value: "none", label: "none" }, ...columns]}
          />
        </div>
        <InputField
          label="Reference impedance"
          name="referenceOhm"
          inputMode="decimal"
          unit="Ω"
          defaultValue={spec.referenceOhm ?? 50}
          errors={fault("referenceOhm")}
        />
        <div className="for-angles">
          <SelectField
            label="Angles in"
            name="angleUnit"
            defaultValue={spec.angleUnit ?? "deg"}
            options={[
              { value: "deg", label: "degrees" },
              { value: "rad", label: "radians" },
            ]}
          />
        </div>
      </div>
      <details>
        <summary>Separators and lines</summary>
        <div className="grid items-start gap-4 pt-3 sm:grid-cols-2">
          <SelectField
            label="Columns separated by"
            name="delimiter"
            defaultValue={nameOf("delimiter", spec.delimiter ?? ",")}
            options={plain(["comma", "semicolon", "tab", "blank"])}
          />
          <SelectField
            label="Decimal sign"
            name="decimal"
            defaultValue={spec.decimal ?? "."}
            options={[
              { value: ".", label: "point" },
              { value: ",", label: "comma" },
            ]}
          />
          <SelectField
            label="Thousands sign"
            name="thousands"
            defaultValue={nameOf("thousands", spec.thousands ?? "")}
            options={plain(["none", "point", "comma", "blank", "apostrophe"])}
          />
          <SelectField
            label="Characters"
            name="encoding"
            defaultValue={spec.encoding ?? "utf-8"}
            options={[
              { value: "utf-8", label: "UTF-8" },
              { value: "utf-16le", label: "UTF-16, little endian" },
              { value: "utf-16be", label: "UTF-16, big endian" },
              { value: "latin1", label: "Latin-1" },
            ]}
          />
          <InputField
            label="Line of the headings"
            hint="0 for none."
            name="headerLine"
            type="number"
            min={0}
            defaultValue={spec.headerLine ?? 0}
            errors={fault("headerLine")}
          />
          <InputField
            label="First line of numbers"
            name="firstDataLine"
            type="number"
            min={1}
            defaultValue={spec.firstDataLine ?? 1}
            errors={fault("firstDataLine")}
          />
        </div>
      </details>
    </>
  );
}

const QUANTITIES: { value: TextSpec["quantity"]; label: string }[] = [
  { value: "s11-db", label: "S11 in dB" },
  { value: "return-loss", label: "Return loss in dB" },
  { value: "swr", label: "SWR" },
  { value: "level", label: "Raw level in dB" },
  { value: "magnitude", label: "Reflection, magnitude" },
  { value: "magnitude-angle", label: "Reflection, magnitude and angle" },
  { value: "db-angle", label: "Reflection, dB and angle" },
  { value: "real-imaginary", label: "Reflection, real and imaginary" },
  { value: "resistance-reactance", label: "Impedance, R and X" },
  { value: "impedance-angle", label: "Impedance, magnitude and angle" },
];

function plain(values: string[]) {
  return values.map((value) => ({ value, label: value }));
}
