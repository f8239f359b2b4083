import { formatNoise } from "~/measurement/units";
import type { SweepPageData } from "../sweep-page.server";

/** The original and the numbers, and how the numbers came about. */
export function Downloads({ data }: { data: SweepPageData }) {
  const { project, sweep, analysis } = data;
  const base = `/projects/${project.publicId}/sweeps/${sweep.publicId}`;
  // What is seen is what is given, also while a plane is only tried.
  const plane = `?plane=${data.correction.plane}`;
  return (
    <section aria-labelledby="downloads" className="grid gap-2 text-small">
      <h2 id="downloads" className="text-base">
        Downloads
      </h2>
      <ul className="flex flex-wrap gap-x-5 gap-y-2">
        <li>
          <a href={`${base}/original`}>
            {sweep.format === "screenshot" && !data.may.edit ? "Picture" : "Original"}, {sweep.fileName}
          </a>
        </li>
        <li>
          <a href={`${base}/sweep.csv${plane}`}>Points as CSV</a>
        </li>
        {sweep.complex && (
          <li>
            <a href={`${base}/sweep.s1p${plane}`}>Touchstone</a>
          </li>
        )}
      </ul>
      {sweep.format === "screenshot" && (
        <p className="soft">
          {data.may.edit
            ? "The untouched original is for owners and experimenters only: it may say where and with what it was taken. Others are given the picture written anew without that."
            : "The picture is given without place and camera data. The untouched original is for owners and experimenters of the project."}
        </p>
      )}
      <p className="soft break-words">
        SHA-256 of the original <span className="font-mono break-all">{sweep.sha256}</span>; analysis{" "}
        {analysis.number} by method {analysis.version}
        {data.noiseDb !== null && `, noise ${formatNoise(data.noiseDb)}`}. {data.correction.words}
      </p>
    </section>
  );
}
