import {
  type ComponentType,
  lazy,
  type ReactNode,
  Suspense,
  useEffect,
  useMemo,
  useRef,
  useState,
} from "react";
import { useHydrated } from "~/components/ui/hydrated";
import type { FrequencyScale } from "./axis";
import type { ChartDip } from "./chart-types";
import { DragBar, type DragMode, type ZoomViewState } from "./DragBar";
import type { ChartPoints } from "./decimate";
import { dipsWithCards, HollowCards } from "./HollowCards";
import type { PlotlyChartProps } from "./PlotlyChart.client";
import { RangeBar } from "./RangeBar";
import { type FrequencyRange, mergePoints } from "./ranges";
import { SweepChart } from "./SweepChart";
import { buildSweepScene, type SceneInput } from "./scene";

// Megabytes: fetched when somebody first turns to the chart, never with the page.
const PlotlyChart = lazy<ComponentType<PlotlyChartProps>>(() =>
  import("./PlotlyChart.client").then(
    ({ PlotlyChart }) => ({ default: PlotlyChart }),
    () => ({ default: PlotlyMissing }),
  ),
);

export interface LiveSweepChartProps extends Omit<SceneInput, "plotWidthPx"> {
  /** The sweep's own ends. */
  whole: FrequencyRange;
  label: string;
  dipHref: (dip: ChartDip) => string;
  chosenDipId?: string | null;
  onPick?: (dipId: string) => void;
  /** The address that shows a stretch; for the whole sweep `range` is `whole`. */
  rangeHref: (range: FrequencyRange) => string;
  /** Called when a stretch was chosen: put it in the address. */
  onRange: (range: FrequencyRange) => void;
  /** A layer of the page's own over the plot, drawn at its scale. */
  overPlot?: (scale: FrequencyScale) => ReactNode;
}

/** A sweep's chart with its cards: drawn by the server, then zoomed, moved and read with the pointer. */
export function LiveSweepChart(props: LiveSweepChartProps) {
  const { whole, label, dipHref, chosenDipId, onPick, rangeHref, onRange, overPlot, ...input } = props;
  const { view, dips, bands, designBands, swrLimit, plotHeightPx, limits, measured } = input;
  const all = useAllPoints(input.points, whole);
  // Limits and the grey stretch go point by point with the points they came with.
  const points = limits || measured ? input.points : all;
  const [asked, setAsked] = useState<FrequencyRange | null>(null);
  const [drag, setDrag] = useState<DragMode | null>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: the address has caught up with what was asked
  useEffect(() => setAsked(null), [view.fromHz, view.toHz, view.scale]);
  const scene = useMemo(
    () =>
      buildSweepScene({ points, limits, measured, dips, bands, designBands, swrLimit, plotHeightPx, view }),
    [points, limits, measured, dips, bands, designBands, swrLimit, plotHeightPx, view],
  );
  const shown = useMemo(() => {
    if (!asked) return scene;
    const moved = { ...view, ...asked };
    return buildSweepScene({
      points,
      limits,
      measured,
      dips,
      bands,
      designBands,
      swrLimit,
      plotHeightPx,
      view: moved,
    });
  }, [asked, scene, points, limits, measured, dips, bands, designBands, swrLimit, plotHeightPx, view]);
  const choose = (range: FrequencyRange) => {
    setAsked(range);
    onRange(range);
  };
  const live = useHydrated() && (drag === "zoom" || drag === "move");
  const [state, setState] = useState<ZoomViewState>("waiting");
  const drawnLive = live && state === "ready";
  const links = { dipHref, chosenDipId, onPick };
  const chosen = dips.find((dip) => dip.id === chosenDipId);
  const now = asked ?? { fromHz: view.fromHz, toHz: view.toHz };
  return (
    <div className="live-chart">
      <div className="live-bar no-print">
        <RangeBar
          now={now}
          whole={whole}
          scale={view.scale}
          aroundHz={chosen?.frequencyHz}
          rangeHref={rangeHref}
          onRange={choose}
        />
        <DragBar drag={drag ?? "off"} onDrag={setDrag} state={live ? state : null} />
      </div>
      <div onPointerEnter={(event) => event.pointerType === "mouse" && drag === null && setDrag("zoom")}>
        <SweepChart
          scene={shown}
          label={label}
          leaders={dipsWithCards(shown)}
          lineHidden={drawnLive}
          {...links}
        >
          {live && (
            <Suspense fallback={null}>
              <PlotlyChart
                scene={scene}
                points={points}
                whole={whole}
                drag={drag === "move" ? "pan" : "zoom"}
                onDrag={setAsked}
                onRange={choose}
                onPick={onPick}
                onState={setState}
              />
            </Suspense>
          )}
          {overPlot?.(shown.scale)}
        </SweepChart>
      </div>
      <HollowCards scene={shown} designBands={designBands} {...links} />
    </div>
  );
}

/** In place of a view that could not be fetched: the drawing and its links stay as they are. */
function PlotlyMissing({ onState }: Pick<PlotlyChartProps, "onState">) {
  useEffect(() => onState("failed"), [onState]);
  return null;
}

/** The points of the stretch in view laid into the widest set seen so far, so that moving shows land at once. */
function useAllPoints(points: ChartPoints, whole: FrequencyRange): ChartPoints {
  const widest = useRef<{ points: ChartPoints; key: string } | null>(null);
  return useMemo(() => {
    const key = `${whole.fromHz} ${whole.toHz}`;
    const known = widest.current?.key === key ? widest.current.points : null;
    if (!known || spanOf(points) >= spanOf(known)) {
      widest.current = { points, key };
      return points;
    }
    return mergePoints(known, points);
  }, [points, whole.fromHz, whole.toHz]);
}

function spanOf({ frequencyHz }: ChartPoints): number {
  return frequencyHz.length > 0 ? frequencyHz[frequencyHz.length - 1] - frequencyHz[0] : 0;
}
