import "../dips.css";
import { Link } from "react-router";
import { capital } from "../advice-words";
import type { DipPageData } from "../dip-page.server";
import { AdoptCause } from "./AdoptCause";
import { CauseTests } from "./CauseTests";
import { NotJudged } from "./NotJudged";

/** What may be behind the dip, likeliest first; inside a design band folded away. */
export function Causes({ data, inside }: { data: DipPageData; inside: boolean }) {
  const { causes } = data.judgement;
  const list = (
    <div className="grid gap-4">
      {causes.length === 0 ? (
        <p className="soft max-w-[72ch]">
          Nothing that is known of the antenna, the feedline or the bench puts a dip here.
        </p>
      ) : (
        <ol className="causes">
          {causes.slice(0, SHOWN).map((cause) => (
            <li key={cause.key} className="cause">
              <p className="cause-title">{capital(cause.title)}</p>
              <p className="text-small">
                <span className="cause-arithmetic">{cause.arithmetic}</span>.{" "}
                <span className="soft">{chanceWords(cause.byChance)}</span>
              </p>
              <p className="text-small">{cause.test}</p>
              {data.mayVerdict.propose && data.dip.verdict !== "settled" && (
                <AdoptCause data={data} cause={cause} />
              )}
            </li>
          ))}
        </ol>
      )}
      <CauseTests data={data} />
      <NotJudged data={data} />
    </div>
  );
  return (
    <section aria-labelledby="causes" className="grid gap-3">
      <h2 id="causes">What it may be</h2>
      {inside ? (
        <details className="causes-inside">
          <summary>It lies where the antenna is meant to work. What would explain it</summary>
          {list}
        </details>
      ) : (
        <>
          <p className="text-small soft max-w-[72ch]">
            Reckoned from lengths that were said, and never more than “may be”.{" "}
            <Link to="/methods#causes">How it is ranked</Link>
          </p>
          {list}
        </>
      )}
    </section>
  );
}

function chanceWords(byChance: number): string {
  const percent = Math.max(1, Math.round(byChance * 100));
  return `Of frequencies chosen blindly ${percent} % would fit this cause as well.`;
}

const SHOWN = 6;
