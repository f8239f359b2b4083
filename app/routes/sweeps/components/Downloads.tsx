import type { SweepPageData } from "../sweep";

/** The original and the numbers, and how the numbers came about. */
export function Downloads({ data }: { data: SweepPageData }) {
  const { project, sweep, analysis } = data;
  const base = `/projects/${project.publicId}/sweeps/${sweep.publicId}`;
  return (
    <section aria-labelledby="downloads" className="grid gap-2 text-small">
      <h2 id="downloads" className="text-base">
        Downloads
      </h2>
      <ul className="flex flex-wrap gap-x-5 gap-y-2">
        <li>
          <a href={`${base}/original`}>Original, {sweep.fileName}</a>
        </li>
        <li>
          <a href={`${base}/sweep.csv`}>Points as CSV</a>
        </li>
        {sweep.complex && (
          <li>
            <a href={`${base}/sweep.s1p`}>Touchstone</a>
          </li>
        )}
      </ul>
      <p className="soft break-words">
        SHA-256 of the original <span className="font-mono break-all">{sweep.sha256}</span>; analysis{" "}
        {analysis.number} by method {analysis.version}
        {data.noiseDb !== null && `, noise ${data.noiseDb.toPrecision(2)} dB`}. Limits of SWR leave out the
        bench: no open, short and load sweeps are known, so what its directivity adds is unknown.
      </p>
    </section>
  );
}
