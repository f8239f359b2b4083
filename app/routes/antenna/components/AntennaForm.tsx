import { useState } from "react";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { CheckboxField, InputField } from "~/components/ui/Field";
import type { AntennaTexts, FieldErrors, SentAntenna } from "../antenna-form";
import "../antenna.css";
import { ElementFields } from "./ElementFields";
import { FeedFields } from "./FeedFields";

export interface AntennaFormProps {
  data: {
    /** Nobody described the antenna before. */
    isFirst: boolean;
    texts: AntennaTexts;
    /** What the form was opened on, as JSON. */
    was: string;
    since: string;
    /** Names to choose from. */
    cables: string[];
  };
  /** What the server said to the form as it was sent; null before it was. */
  answer: { sent: SentAntenna; more?: boolean } | null;
  errors: FieldErrors;
}

/** The whole antenna in one form; it works without scripts, where another element costs a round. */
export function AntennaForm({ data, answer, errors }: AntennaFormProps) {
  const busy = useNavigation().formData?.get("intent") === "keep";
  const [more, setMore] = useState(0);
  const shown = answer?.sent ?? data.texts;
  const spare = (shown.elements.some(({ kind }) => !kind) ? 0 : 1) + (answer?.more ? 1 : 0) + more;
  const rows = [...shown.elements, ...Array.from({ length: spare }, () => ({}))];
  const [whole, confirm] = [errors[""]?.[0], errors.confirm?.[0]];
  return (
    <Form method="post" className="grid gap-8" noValidate>
      <input type="hidden" name="was" value={answer?.sent.was ?? data.was} />
      {whole && (
        <p role="alert" className="text-alarm">
          {whole}
        </p>
      )}
      <section aria-labelledby="elements" className="grid gap-4">
        <h3 id="elements">Elements, radials, mast and guys</h3>
        <div className="grid gap-4">
          {rows.map((row, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a row is its place in the form
            <ElementFields key={i} index={i} row={row} errors={errors} />
          ))}
        </div>
        <div>
          <Button
            name="intent"
            value="another"
            variant="quiet"
            size="small"
            icon="add"
            onClick={(event) => {
              event.preventDefault();
              setMore(more + 1);
            }}
          >
            Another element
          </Button>
        </div>
      </section>
      <FeedFields texts={shown} cables={data.cables} errors={errors} />
      <section aria-labelledby="since-when" className="grid gap-4 max-w-[40rem]">
        <h3 id="since-when">Since when</h3>
        <InputField
          label="It has been so since"
          hint="In UTC. Sweeps from then on belong to the antenna as it is described here."
          name="since"
          type="datetime-local"
          defaultValue={answer?.sent.since ?? data.since}
          errors={errors.since ?? undefined}
        />
        <InputField
          label="What changed, in a line"
          hint="May stay empty: what differs is listed anyway."
          name="remark"
          defaultValue={answer?.sent.remark ?? ""}
          errors={errors.remark ?? undefined}
          maxLength={300}
        />
        {confirm && (
          <CheckboxField
            name="confirm"
            label="The lengths in question are right"
            errors={[confirm]}
            aria-describedby={undefined}
          />
        )}
        <div>
          <Button name="intent" value="keep" busy={busy}>
            {data.isFirst ? "Keep this description" : "Keep this change"}
          </Button>
        </div>
      </section>
    </Form>
  );
}
