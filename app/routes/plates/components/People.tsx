import type { PlateRecord } from "~/services/plates/record";

/** Who took part, with the part each had, as it was frozen. */
export function People({ people }: { people: PlateRecord["people"] }) {
  if (people.length === 0) return null;
  return (
    <section aria-labelledby="people" className="grid gap-2 content-start">
      <h2 id="people">People</h2>
      <ul className="grid gap-1">
        {people.map(({ name, part }) => (
          <li key={`${name} ${part}`}>
            {name} <span className="text-small soft">{part}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
