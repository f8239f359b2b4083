import type { BenchPageData } from "../bench-page.server";
import { GIVEN_FIELDS, PART_KINDS, STANDARD_FIELDS } from "../benches.schema";
import { figureText } from "../version-form";

/** What the version is made of, and what is said of its standards. */
export function Parts({ data }: { data: BenchPageData }) {
  const { version, standards, given } = data;
  const figures = [
    ...STANDARD_FIELDS.map((field) => ({ ...field, value: standards[field.key] })),
    ...GIVEN_FIELDS.map((field) => ({ ...field, value: given[field.key] })),
  ].filter(({ value }) => value !== null);
  return (
    <section aria-labelledby="parts" className="grid gap-3">
      <h2 id="parts">Parts and standards</h2>
      {version.parts.length === 0 ? (
        <p className="soft">No connector or cable is listed.</p>
      ) : (
        <ul className="grid gap-1">
          {version.parts.map(({ kind, text }) => (
            <li key={`${kind} ${text}`} className="break-words min-w-0">
              <span className="soft text-small">
                {PART_KINDS.find(({ value }) => value === kind)?.label ?? "Other"}
              </span>{" "}
              {text}
            </li>
          ))}
        </ul>
      )}
      {figures.length === 0 ? (
        <p className="text-small soft">The standards are taken as ideal; nothing is given without a sweep.</p>
      ) : (
        <dl className="bench-figures-list">
          {figures.map((field) => (
            <div key={field.key} className="flex flex-wrap justify-between gap-x-3">
              <dt className="soft">{field.label}</dt>
              <dd className="number">
                {figureText(field, field.value)} {field.unit}
              </dd>
            </div>
          ))}
        </dl>
      )}
    </section>
  );
}
