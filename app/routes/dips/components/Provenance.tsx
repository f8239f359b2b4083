import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import { formatDb, formatFrequency, formatNoise } from "~/measurement/units";
import { correctionWords } from "../../sweeps/correction-words";
import type { DipPageData } from "../dip-page.server";

/** How the numbers came about: file, reading, analysis and its settings. */
export function Provenance({ data }: { data: DipPageData }) {
  const { provenance: from, projectId, sweep } = data;
  const base = `/projects/${projectId}/sweeps/${sweep.publicId}`;
  return (
    <section aria-labelledby="provenance" className="grid gap-2 text-small">
      <h2 id="provenance">Where the numbers come from</h2>
      <p>
        File{" "}
        <a href={`${base}/original`} download>
          {from.fileName}
        </a>
        {from.by && ` from ${from.by}`}, SHA-256 <span className="font-mono break-all">{from.sha256}</span>.
      </p>
      <p>
        <Link to={`${base}/reading`}>Reading {from.readingNumber ?? "unknown"}</Link>:{" "}
        {from.format ?? "unknown format"}, {from.quantity ? QUANTITIES[from.quantity] : "unknown quantity"}
        {from.pointCount !== null && `, ${from.pointCount} points`}
        {from.startHz !== null &&
          from.stopHz !== null &&
          ` from ${formatFrequency(from.startHz)} to ${formatFrequency(from.stopHz)}`}
        {from.referenceOhm !== null && `, referred to ${from.referenceOhm} Ω`}
        {from.complex ? ", with phase." : ", without phase."}
      </p>
      {from.assumed.length > 0 && (
        <ul className="list-disc pl-5">
          {from.assumed.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      )}
      <p>
        Analysis {from.analysisNumber ?? "unknown"}, method version{" "}
        <span className="font-mono">{from.analysisVersion ?? "unknown"}</span>
        {from.analysedAt && (
          <>
            , <DateTime at={from.analysedAt} />
          </>
        )}
        {from.settings &&
          `; SWR limit ${from.settings.swrLimit}, smallest prominence ${formatDb(from.settings.minimumProminenceDb)}`}
        ; noise of the sweep {formatNoise(from.noiseDb)} (standard deviation).
      </p>
      <p>{correctionWords(from.correction)}</p>
      <p className="soft">
        Every number is defined, with its source and its limits, among the <Link to="/methods">methods</Link>.
      </p>
    </section>
  );
}

const QUANTITIES = {
  "s11-db": "S11 in dB",
  "return-loss": "return loss",
  swr: "SWR",
  level: "level against a 0 dB line",
  gamma: "reflection coefficient",
  impedance: "impedance",
} as const;
