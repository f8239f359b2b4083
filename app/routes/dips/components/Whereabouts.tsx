import { formatFrequency, formatPercent, formatWidth } from "~/measurement/units";
import type { DipPageData } from "../dip-page.server";
import { TrimPart } from "./TrimPart.tsx";

/** Where the dip lies: relative to the design bands, and to the allocations of the project's region. */
export function Whereabouts({ data }: { data: DipPageData }) {
  const hz = data.dip.numbers.frequencyHz;
  const { designBands, allocation, region, bandSources } = data;
  return (
    <section aria-labelledby="whereabouts" className="grid gap-2">
      <h2 id="whereabouts">Where it lies</h2>
      {designBands.length === 0 ? (
        <p>The project has no design bands yet. An owner can give them in its settings.</p>
      ) : (
        <ul className="grid gap-1">
          {designBands.map((band) => (
            <li key={`${band.name} ${band.lowHz}`} className="flex flex-wrap gap-x-3">
              <span className="font-semibold">{band.name}</span>
              <span className="font-mono text-small self-center">
                {formatFrequency(band.lowHz)} – {formatFrequency(band.highHz)}
              </span>
              <span className={holds(band, hz) ? "text-moss" : "text-clay"}>{relationTo(band, hz)}</span>
            </li>
          ))}
        </ul>
      )}
      <TrimPart data={data} inside={designBands.some((band) => holds(band, hz))} />
      <p>
        {allocation
          ? `${regionWords(region)}, ${allocation.name} is allocated to amateurs here`
          : `${regionWords(region)}, no amateur allocation of our table holds it`}
        {allocation?.remark && ` (${allocation.remark})`}. National limits differ, and only they decide.
      </p>
      <p className="text-small soft">
        Allocations after:{" "}
        {bandSources.map((source) => `${source.title}, ${source.date} (${source.seen})`).join("; ")}.
      </p>
    </section>
  );
}

function relationTo(band: { lowHz: number; highHz: number }, hz: number): string {
  if (holds(band, hz)) return "the dip lies inside";
  const above = hz > band.highHz;
  const offHz = above ? hz - band.highHz : band.lowHz - hz;
  const share = offHz / (above ? band.highHz : band.lowHz);
  const far = share < 1 ? ` (${formatPercent(share)})` : "";
  return `the dip lies ${formatWidth(offHz)} ${above ? "above" : "below"} it${far}`;
}

function holds(band: { lowHz: number; highHz: number }, hz: number): boolean {
  return band.lowHz <= hz && hz <= band.highHz;
}

function regionWords(region: number | null): string {
  return region === null ? "In any of the three ITU regions" : `In ITU region ${region}`;
}
