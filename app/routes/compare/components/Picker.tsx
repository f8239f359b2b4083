import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { DateTime } from "~/components/ui/DateTime";
import { InputField } from "~/components/ui/Field";
import { compareFields } from "../compare.schema";
import type { ComparePageData } from "../compare-page.server";

/** More sweeps: of this project by a tick, of another one by its address. A plain form, so that the address is the choice. */
export function Picker({ data }: { data: ComparePageData }) {
  const { view, choices, full, sweeps } = data;
  if (full) return null;
  const kept = compareFields({ ...view, words: "" });
  return (
    <details className="compare-picker no-print" open={sweeps.length < 2 || view.words !== ""}>
      <summary>{sweeps.length === 0 ? "Choose sweeps" : "Add sweeps"}</summary>
      <Form method="get" className="grid gap-4" preventScrollReset>
        {kept.map(([name, value]) => (
          <input key={`${name} ${value}`} type="hidden" name={name} value={value} />
        ))}
        <div className="flex flex-wrap items-end gap-3">
          <InputField
            label="In this project: title or file name"
            name="q"
            type="search"
            defaultValue={view.words}
          />
          <Button variant="quiet">Look</Button>
        </div>
        {choices.length === 0 ? (
          <p className="soft">
            {view.words
              ? "No sweep of this project has these words. Look for others, or for none to see them all."
              : "No other sweep of this project has numbers."}
          </p>
        ) : (
          <fieldset className="min-w-0">
            <legend className="text-small soft">
              {view.words ? "Found, the newest first" : "The newest of this project"}
            </legend>
            <ul className="compare-choices">
              {choices.map(({ publicId, title, takenAt }) => (
                <li key={publicId}>
                  <label>
                    <input type="checkbox" name="sweep" value={publicId} />
                    <span className="min-w-0 break-words">
                      {title}{" "}
                      <span className="text-tiny soft">
                        {takenAt ? <DateTime at={takenAt} dateOnly /> : "no date"}
                      </span>
                    </span>
                  </label>
                </li>
              ))}
            </ul>
          </fieldset>
        )}
        <InputField
          label="Of another project: the sweep's address"
          hint="Paste it from the address line of the sweep's page. What you may not read there is not shown here either."
          name="add"
        />
        <div>
          <Button>{sweeps.length === 0 ? "Compare" : "Add to the comparison"}</Button>
        </div>
      </Form>
    </details>
  );
}
