import type { ReactNode } from "react";
import { Link } from "react-router";
import { LimitSources } from "~/components/LimitSources";
import type { Bandwidth, Dip, Plane } from "~/measurement/sweep";
import {
  formatDb,
  formatDbLimits,
  formatFrequency,
  formatPercent,
  formatRange,
  formatSwr,
  formatWidth,
  formatWidthLimits,
} from "~/measurement/units";
import type { DipPageData } from "../dip-page.server";

/** The dip in numbers, each with its limits and how it was had. */
export function DipNumbers({ data }: { data: DipPageData }) {
  const { numbers } = data.dip;
  const { complex, correction } = data.provenance;
  const seen = SEEN[correction?.plane ?? "instrument"];
  return (
    <section aria-labelledby="numbers" className="grid gap-3">
      <h2 id="numbers">Numbers</h2>
      {numbers.edge && (
        <p>
          The lowest point is the sweep's own end: the dip may go on beyond it, so nothing is fitted here.
          Sweep further to see it whole.
        </p>
      )}
      <dl className="grid">
        <Row
          label="Frequency"
          anchor="lowest-swr"
          number={formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz)}
        >
          {numbers.frequencyUncertaintyHz === null
            ? "limits unknown"
            : `± ${formatWidth(numbers.frequencyUncertaintyHz, numbers.frequencyUncertaintyHz)} (95 %)`}
          {numbers.benchFrequencyHalfHz !== null &&
            `; the bench may have moved it by ${formatWidth(numbers.benchFrequencyHalfHz, numbers.benchFrequencyHalfHz)} at worst`}
          . {METHOD[numbers.method]}
          {data.closeUp.stepHz !== null && ` Points ${formatWidth(data.closeUp.stepHz)} apart.`}
        </Row>
        <Row
          label="Lowest SWR"
          anchor="lowest-swr"
          number={formatSwr(numbers.minimumSwr, numbers.minimumSwrLow, numbers.minimumSwrHigh)}
        >
          {noiseWords(numbers)} {benchWords(numbers)}
        </Row>
        <Row
          label="Return loss"
          anchor="return-loss"
          number={formatDbLimits(numbers.returnLossDb, numbers.returnLossLowDb, numbers.returnLossHighDb)}
        >
          at the dip, {formatDb(numbers.prominenceDb)} below the lower of the crests beside it (its
          prominence).
        </Row>
        <BandwidthRow numbers={numbers} limitSwr={data.provenance.settings?.swrLimit ?? 2} />
        <Row label="Q" anchor="q" number={qWords(numbers)}>
          {numbers.qLimits &&
            `Between ${formatRange(numbers.qLimits.low, numbers.qLimits.high)} with the limits of width and SWR; `}
          {numbers.q === null && numbers.qLow === null
            ? "can't be had without a bandwidth, or where two dips share one."
            : complex
              ? `loaded, of what is seen ${seen}.`
              : `loaded, of what is seen ${seen}; a range, as without phase a resistance over the reference can't be told from one under it.`}
        </Row>
        {numbers.advice && (
          <Row label="Sweep again" number={`${numbers.advice.points} points`}>
            over {formatFrequency(numbers.advice.startHz)} to {formatFrequency(numbers.advice.stopHz)}: this
            dip has too few points for its width.
          </Row>
        )}
      </dl>
      {(numbers.shares.length > 0 || numbers.unknown.length > 0) && (
        <div className="grid gap-1 text-small">
          <h3>What limits the SWR</h3>
          <LimitSources
            dip={numbers}
            benchHref={data.benchId && `/projects/${data.projectId}/benches/${data.benchId}`}
          />
        </div>
      )}
    </section>
  );
}

function BandwidthRow({ numbers, limitSwr }: { numbers: Dip; limitSwr: number }) {
  const { bandwidth } = numbers;
  const label = `${Number((bandwidth?.limitSwr ?? limitSwr).toFixed(2))}:1 bandwidth`;
  if (!bandwidth) {
    return (
      <Row label={label} anchor="bandwidth" number="none">
        {numbers.edge ? "not determined at the sweep's end." : "the SWR does not get as low as the limit."}
      </Row>
    );
  }
  const { widthHz, widthUncertaintyHz, widthLowHz, widthHighHz } = bandwidth;
  const width = formatWidth(widthHz, widthUncertaintyHz);
  return (
    <Row label={label} anchor="bandwidth" number={bandwidth.open ? `at least ${width}` : width}>
      {edgesOf(bandwidth)}
      {bandwidth.fractional !== null && `, ${formatPercent(bandwidth.fractional)} of the centre`}.{" "}
      {widthUncertaintyHz === null
        ? "Limits unknown."
        : `± ${formatWidth(widthUncertaintyHz, widthUncertaintyHz)} (95 %).`}
      {widthLowHz !== null &&
        widthHighHz !== null &&
        ` With the bench's errors ${formatWidthLimits(widthHz, widthLowHz, widthHighHz)}, worst case.`}
      {bandwidth.shared && " Another dip lies in the same stretch: the width belongs to both."}
      {bandwidth.open && " The sweep ends inside, so it is wider than this."}
    </Row>
  );
}

function edgesOf({ lowHz, highHz, widthUncertaintyHz }: Bandwidth): string {
  const edge = (hz: number | null) =>
    hz === null ? "the sweep's end" : formatFrequency(hz, widthUncertaintyHz);
  return `from ${edge(lowHz)} to ${edge(highHz)}`;
}

interface RowProps {
  label: string;
  /** Of the methods page. */
  anchor?: string;
  number: string;
  children: ReactNode;
}

function Row({ label, anchor, number, children }: RowProps) {
  return (
    <div className="grid gap-x-4 border-b border-rule py-2 sm:grid-cols-[8rem_11rem_1fr]">
      <dt className="text-small soft pt-0.5">
        {anchor ? (
          <Link to={`/methods#${anchor}`} title="How it is defined">
            {label}
          </Link>
        ) : (
          label
        )}
      </dt>
      <dd className="font-mono font-semibold">{number}</dd>
      <dd className="text-small pt-0.5">{children}</dd>
    </div>
  );
}

function noiseWords({ minimumSwrNoiseLow: low, minimumSwrNoiseHigh: high }: Dip): string {
  if (low === null || high === null) return "Limits from noise: unknown.";
  return `From noise and fit alone ${formatRange(low, high)} (95 %).`;
}

function benchWords({ minimumSwrLow: low, minimumSwrHigh: high }: Dip): string {
  if (low === null || high === null) return "With the bench's errors: unknown.";
  return `With the bench's errors ${formatRange(low, high)}, worst case.`;
}

function qWords({ q, qLow, qHigh }: Dip): string {
  if (qLow !== null && qHigh !== null) return formatRange(qLow, qHigh);
  return q === null ? "unknown" : formatRange(q, q);
}

const SEEN: Record<Plane, string> = {
  instrument: "by the instrument",
  port: "at the bench's port",
  antenna: "at the antenna's end of the feedline",
};

const METHOD: Record<Dip["method"], string> = {
  fit: "From the fit of a resonator behind a constant loss.",
  parabola: "From a parabola through three points of return loss.",
  sample: "The lowest point itself: nothing could be fitted.",
};
