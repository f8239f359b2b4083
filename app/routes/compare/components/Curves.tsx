import { Link, useNavigate } from "react-router";
import { frequencyScale } from "~/charts/axis";
import { OverlayChart } from "~/charts/OverlayChart";
import { RangeBar } from "~/charts/RangeBar";
import type { FrequencyRange } from "~/charts/ranges";
import { StripDrag } from "~/charts/StripDrag";
import { MakePlate } from "~/components/plates/MakePlate";
import { useHydrated } from "~/components/ui/hydrated";
import { compareSearch } from "../compare.schema";
import type { ComparePageData, ShownComparison } from "../compare-page.server";

interface CurvesProps {
  data: ComparePageData;
  shown: ShownComparison;
}

/** The sweeps over one another, and under them what each has more than the one they are held against. */
export function Curves({ data, shown }: CurvesProps) {
  const { view, sweeps, reference } = data;
  const { overlay, difference, whole } = shown;
  const navigate = useNavigate();
  const hydrated = useHydrated();
  const searchFor = ({ fromHz, toHz }: FrequencyRange) =>
    compareSearch(view, {
      fromHz: fromHz > whole.fromHz ? fromHz : null,
      toHz: toHz < whole.toHz ? toHz : null,
    });
  const onRange = (to: FrequencyRange) =>
    navigate(searchFor(to), { replace: true, preventScrollReset: true });
  const against = sweeps.find(({ publicId }) => publicId === reference);
  const axis = frequencyScale(shown.scale, shown.range.fromHz, shown.range.toHz);
  const drag = hydrated && <StripDrag scale={axis} onRange={onRange} />;
  return (
    <section aria-labelledby="curves" className="grid gap-4 min-w-0">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h3 id="curves">Over one another</h3>
        <ViewBar {...{ data, shown, searchFor, onRange }} />
        {sweeps.length > 1 && sweeps.length <= MOST_ON_A_PLATE && (
          <MakePlate from={`compare:${sweeps.map(({ publicId }) => publicId).join(",")}`} view={view} />
        )}
      </div>
      <OverlayChart
        scene={overlay}
        keyHidden
        namesBeside
        label={`${view.quantity === "swr" ? "SWR" : "Return loss"} of ${sweeps.map(({ letter, title }) => `${letter}, ${title}`).join("; ")}. The numbers are in the tables below.`}
      >
        {drag}
      </OverlayChart>
      {overlay.remarks.map((remark) => (
        <p key={remark} className="text-tiny soft">
          {remark}
        </p>
      ))}
      {difference && against && (
        <div className="grid gap-1 min-w-0">
          <h3 className="text-base">
            Return loss, each less {against.letter}: <span className="font-normal">{against.title}</span>
          </h3>
          {difference.scene && (
            <>
              <OverlayChart
                scene={difference.scene}
                keyHidden
                namesBeside
                label={`Return loss of each sweep less that of ${against.letter}, in dB`}
              >
                {drag}
              </OverlayChart>
              <p className="text-small soft max-w-[72ch]">
                Above the line less comes back than in {against.letter}. Drawn only where both sweeps reach.
              </p>
            </>
          )}
          {difference.apart.length > 0 && (
            <p className="text-small text-clay">
              {difference.apart.join(", ")}: no frequency in common with {against.letter}, so no difference
              can be had.
            </p>
          )}
        </div>
      )}
    </section>
  );
}

interface ViewBarProps extends CurvesProps {
  searchFor: (range: FrequencyRange) => string;
  onRange: (range: FrequencyRange) => void;
}

function ViewBar({ data: { view }, shown: { range, whole, scale }, searchFor, onRange }: ViewBarProps) {
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2 no-print">
      <RangeBar
        now={range}
        whole={whole}
        scale={scale}
        of="the sweeps"
        rangeHref={searchFor}
        onRange={onRange}
      />
      <nav className="choice" aria-label="Curve">
        {(["rl", "swr"] as const).map((quantity) => (
          <Link
            key={quantity}
            to={compareSearch(view, { quantity })}
            aria-current={view.quantity === quantity ? "true" : undefined}
            replace
            preventScrollReset
          >
            {quantity === "rl" ? "Return loss" : "SWR"}
          </Link>
        ))}
      </nav>
      <nav className="choice" aria-label="Frequency axis">
        {(["linear", "log"] as const).map((kind) => (
          <Link
            key={kind}
            to={compareSearch(view, { scale: kind })}
            aria-current={scale === kind ? "true" : undefined}
            replace
            preventScrollReset
          >
            {kind === "linear" ? "Linear" : "Logarithmic"}
          </Link>
        ))}
      </nav>
    </div>
  );
}

const MOST_ON_A_PLATE = 8;
