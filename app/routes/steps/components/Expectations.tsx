import { Link } from "react-router";
import { formatFrequency } from "~/measurement/units";
import { expectationWords } from "../expectation-words";
import type { StepPageData } from "../step-page.server";

type Place = StepPageData["effect"]["expected"][number];

/** Where each trail was expected, as reckoned when the step was planned, against where it came. */
export function Expectations({ data }: { data: StepPageData }) {
  const { step, effect } = data;
  if (effect.expected.length === 0) return null;
  const moving = effect.expected.filter(({ lowHz }) => lowHz !== null);
  const staying = effect.expected.filter(({ lowHz }) => lowHz === null);
  return (
    <section aria-labelledby="expected" className="grid gap-3">
      <h3 id="expected">
        {step.state === "planned" ? "What to expect" : "What was expected, and what came"}
      </h3>
      <ul className="grid gap-3">
        {[...moving, ...staying].map((place) => (
          <li
            key={place.trail}
            className={`border-l-3 pl-3 grid gap-1 ${place.lowHz === null ? "border-rule" : "border-heather"}`}
          >
            <Expected place={place} data={data} />
            <p className="text-small soft max-w-[72ch]">{place.how}</p>
            {step.state === "done" && <p>{expectationWords(place, effect.after !== null)}</p>}
          </li>
        ))}
      </ul>
    </section>
  );
}

function Expected({ place, data }: { place: Place; data: StepPageData }) {
  const { name, trail, was, frequencyHz, lowHz, highHz } = place;
  const half =
    lowHz === null || highHz === null ? (was?.frequencyUncertaintyHz ?? null) : (highHz - lowHz) / 2;
  const hz = (value: number) => formatFrequency(value, half);
  const from = was ? formatFrequency(was.frequencyHz, was.frequencyUncertaintyHz) : null;
  return (
    <p>
      <Link to={`/projects/${data.project.publicId}/trails/${trail}`} className="font-semibold">
        {name || (from ? `The dip at ${from}` : "An unnamed trail")}
      </Link>
      {": "}
      <span className="number">{hz(frequencyHz)}</span>
      {lowHz !== null && highHz !== null ? (
        <span className="number text-small">
          {" "}
          ({hz(lowHz)} – {hz(highHz)})
        </span>
      ) : (
        <span className="text-small soft"> limits unknown</span>
      )}
    </p>
  );
}
