import type { ReactNode } from "react";
import { Link } from "react-router";
import { DateTime } from "~/components/ui/DateTime";
import type { PlatePageData, ShownSource } from "../plate-page.server";
import { bytesWords, correctionWords, ROLES, readingWords } from "../source-words";

/** Original → reading → correction → analysis → figure, of every sweep that the plate rests on. */
export function Chain({ plate }: { plate: PlatePageData }) {
  const sweeps = plate.sources.filter(({ role }) => role === "sweep");
  const references = plate.sources.filter(({ role }) => role !== "sweep");
  return (
    <section aria-labelledby="chain" className="grid gap-4">
      <h2 id="chain">How it came about</h2>
      {sweeps.map((source) => (
        <Source key={source.sweep} source={source} plate={plate} alone={sweeps.length === 1} />
      ))}
      {references.length > 0 && (
        <details>
          <summary>
            {references.length === 1
              ? "One reference of the bench"
              : `${references.length} references of benches`}
          </summary>
          <ul className="grid gap-2 pt-2">
            {references.map((source) => (
              <li key={`${source.sweep} ${source.role}`}>
                <Original source={source} plate={plate} />
              </li>
            ))}
          </ul>
        </details>
      )}
      <p className="plate-small">
        Figure and tables by Swale {plate.code.version}, method {plate.code.analysisVersion}, on{" "}
        <DateTime at={plate.madeAt} />.
      </p>
    </section>
  );
}

function Source({ source, plate, alone }: { source: ShownSource; plate: PlatePageData; alone: boolean }) {
  const chain = (
    <ol className="chain">
      <Stage name="Original">
        <Original source={source} plate={plate} />
      </Stage>
      <Stage name="Reading">
        {readingWords(source)}
        {source.reading.assumed.length > 0 && (
          <ul className="list-disc pl-5">
            {source.reading.assumed.map((words) => (
              <li key={words}>assumed: {words}</li>
            ))}
          </ul>
        )}
      </Stage>
      <Stage name="Correction">{correctionWords(source)}</Stage>
      <Stage name="Analysis">
        {source.settings
          ? `Bandwidths at SWR ${source.settings.swrLimit}, dips of at least ${source.settings.minimumProminenceDb} dB, method ${source.analysisVersion ?? "unknown"}`
          : "None"}
      </Stage>
      <Stage name="Figure">This plate</Stage>
    </ol>
  );
  if (alone) return chain;
  return (
    <details>
      <summary>{source.title}</summary>
      <div className="pt-3">{chain}</div>
    </details>
  );
}

function Stage({ name, children }: { name: string; children: ReactNode }) {
  return (
    <li>
      <p className="font-semibold">{name}</p>
      <div className="text-small">{children}</div>
    </li>
  );
}

function Original({ source, plate }: { source: ShownSource; plate: PlatePageData }) {
  const { role, sweep, title, takenAt, name, sizeBytes, sha256 } = source;
  const there = plate.projectPath && plate.present.includes(sweep);
  return (
    <div className="grid gap-0.5 text-small">
      <p>
        {role !== "sweep" && `${ROLES[role]}: `}
        {there ? <Link to={`${plate.projectPath}/sweeps/${sweep}`}>{title}</Link> : title},{" "}
        {takenAt ? (
          <>
            taken <DateTime at={takenAt} dateOnly />
          </>
        ) : (
          "date not said"
        )}
      </p>
      <p className="break-words">
        {name}, {bytesWords(sizeBytes)}
      </p>
      <p className="hash">SHA-256 {sha256}</p>
    </div>
  );
}
