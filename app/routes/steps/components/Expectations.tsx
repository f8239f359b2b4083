import { Link } from "react-router";
import { formatFrequency } from "~/measurement/units";
import { expectationWords } from "../expectation-words";
import type { StepPageData } from "../step";

/** Where each trail was expected, as reckoned when the step was planned, against where it came. */
export function Expectations({ data }: { data: StepPageData }) {
  const { step, effect, project } = data;
  if (effect.expected.length === 0) return null;
  return (
    <section aria-labelledby="expected" className="grid gap-3">
      <h3 id="expected">
        {step.state === "planned" ? "What to expect" : "What was expected, and what came"}
      </h3>
      <ul className="grid gap-3">
        {effect.expected.map((place) => (
          <li key={place.trail} className="border-l-3 border-heather pl-3 grid gap-1">
            <p>
              <Link to={`/projects/${project.publicId}/trails/${place.trail}`} className="font-semibold">
                {place.name || "Unnamed trail"}
              </Link>
              : <span className="number">{formatFrequency(place.frequencyHz, halfWidth(place))}</span>
              {place.lowHz !== null && place.highHz !== null ? (
                <span className="number text-small">
                  {" "}
                  ({formatFrequency(place.lowHz, halfWidth(place))} –{" "}
                  {formatFrequency(place.highHz, halfWidth(place))})
                </span>
              ) : (
                <span className="text-small soft"> limits unknown</span>
              )}
            </p>
            <p className="text-small soft max-w-[72ch]">{place.how}</p>
            {step.state === "done" && <p>{expectationWords(place, effect.after !== null)}</p>}
          </li>
        ))}
      </ul>
    </section>
  );
}

function halfWidth({ lowHz, highHz }: { lowHz: number | null; highHz: number | null }): number | null {
  return lowHz === null || highHz === null ? null : (highHz - lowHz) / 2;
}
