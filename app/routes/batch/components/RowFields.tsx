import { Link } from "react-router";
import { CheckboxField, InputField, SelectField } from "~/components/ui/Field";
import type { ShownBatch, ShownRow } from "../run-page.server";

export interface RowFieldsProps {
  row: ShownRow;
  batch: ShownBatch;
  base: string;
}

/** One row with its problems and the fields that mend them. */
export function RowFields({ row, batch, base }: RowFieldsProps) {
  const { index, name, line, wanted, chosen, problems } = row;
  const field = (key: string) => ({ name: `row-${index}-${key}`, id: `row-${index}-${key}` });
  const about = name || "the row without a name";
  return (
    <fieldset className="panel grid grid-cols-1 gap-3 min-w-0">
      <legend className="sr-only">{about}</legend>
      <input type="hidden" name={`row-${index}-name`} value={name} />
      <div className="min-w-0">
        <p className="font-semibold break-all">
          {about}
          {line !== null && <span className="soft font-normal"> · line {line} of the table</span>}
        </p>
        <ul className="grid gap-1">
          {problems.map(({ code, words, sweep }) => (
            <li key={code} className="text-clay break-words">
              {words} {sweep && <Link to={`${base}/sweeps/${sweep}`}>Look at it</Link>}
            </li>
          ))}
        </ul>
      </div>
      <div className="grid grid-cols-[repeat(auto-fill,minmax(min(13rem,100%),1fr))] gap-3">
        {row.missing && batch.spare.length > 0 && (
          <SelectField
            label="Its file"
            {...field("file")}
            defaultValue=""
            options={[{ value: "", label: "Not here yet" }, ...batch.spare]}
          />
        )}
        <InputField label="Title" {...field("title")} defaultValue={wanted.title} />
        <InputField
          label="Taken at"
          unit="UTC"
          {...field("takenAt")}
          defaultValue={wanted.takenAt}
          placeholder="2026-09-14 17:20"
        />
        <SelectField
          label="Bench"
          {...field("bench")}
          defaultValue={chosen.bench}
          options={withOwn(batch.benches, chosen.bench, "Not said")}
        />
        <SelectField
          label="After the step"
          {...field("step")}
          defaultValue={chosen.step}
          options={withOwn(batch.steps, chosen.step, "Not said")}
        />
      </div>
      <div className="flex flex-wrap gap-x-6 gap-y-2">
        <CheckboxField label="Leave out" {...field("leftOut")} value="yes" defaultChecked={row.leftOut} />
        {row.keepable && (
          <CheckboxField
            label="Take it in unread, and say later how to read it"
            {...field("keepUnread")}
            value="yes"
            defaultChecked={row.keepUnread}
          />
        )}
      </div>
    </fieldset>
  );
}

/** What was written stays among the choices, so that nothing is changed unseen. */
function withOwn(options: { value: string; label: string }[], own: string, none: string) {
  const known = own === "" || options.some(({ value }) => value === own);
  return [
    { value: "", label: none },
    ...(known ? [] : [{ value: own, label: `“${own}” (not known here)` }]),
    ...options,
  ];
}
