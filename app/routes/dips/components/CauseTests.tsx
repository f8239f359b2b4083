import { capital } from "../advice-words";
import type { DipPageData } from "../dip-page.server";

/** The changes that tell the causes apart: what each of them says the dip will do. */
export function CauseTests({ data: { judgement } }: { data: DipPageData }) {
  const { causes, tests } = judgement;
  if (tests.length === 0 || causes.length < 2) return null;
  const compared = causes.slice(0, tests[0].predictions.length);
  return (
    <div className="grid gap-2">
      <h3>What would tell them apart</h3>
      <ul className="grid gap-3">
        {tests.map(({ change, predictions }) => (
          <li key={change} className="cause-test">
            <p className="font-semibold">{change}</p>
            <dl className="cause-predictions">
              {compared.map(({ key, title }, i) => (
                <div key={key}>
                  <dt>{capital(title.replace(/^may be /, ""))}</dt>
                  <dd>{predictions[i]}</dd>
                </div>
              ))}
            </dl>
          </li>
        ))}
      </ul>
    </div>
  );
}
