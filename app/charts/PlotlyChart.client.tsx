import Plotly from "plotly.js-dist-min";
import { useMemo } from "react";
import createPlotlyComponent from "react-plotly.js/factory";
import type { ZoomViewState } from "./DragBar";
import type { ChartPoints } from "./decimate";
import { usePageColours } from "./page-colours";
import { axisHz, axisValue, figureLayout, figureLine } from "./plotly-figure";
import type { FrequencyRange } from "./ranges";
import type { Scene } from "./scene";

const Plot = createPlotlyComponent(Plotly);

export interface PlotlyChartProps {
  /** The drawing underneath, as it is without a drag in progress. */
  scene: Scene;
  points: ChartPoints;
  whole: FrequencyRange;
  drag: "zoom" | "pan";
  /** While a drag lasts. */
  onDrag: (range: FrequencyRange) => void;
  onRange: (range: FrequencyRange) => void;
  onPick?: (dipId: string) => void;
  onState: (state: ZoomViewState) => void;
}

/** A press this near to a dip picks it. */
const PICK_PX = 14;

/** The line of a sweep with zoom, pan, read-out and picking, laid over the drawing's plot. */
export function PlotlyChart(props: PlotlyChartProps) {
  const { scene, points, whole, drag, onDrag, onRange, onPick, onState } = props;
  const { view, plotHeightPx, yOfMagnitude } = scene;
  const palette = usePageColours();
  const data = useMemo(() => {
    const { x, y, readY, words } = figureLine(points, view.scale, yOfMagnitude, plotHeightPx);
    const common = { type: "scatter", mode: "lines", connectgaps: false, x } as const;
    const pen = { ...common, y, line: { color: palette.ink, width: 1.6 }, hoverinfo: "skip" } as const;
    const unseen = { color: "rgba(0,0,0,0)", width: 1 };
    const reader = {
      ...common,
      y: readY,
      line: unseen,
      text: words,
      hovertemplate: "%{text}<extra></extra>",
    };
    return [pen, reader] as Plotly.Data[];
  }, [points, view.scale, yOfMagnitude, plotHeightPx, palette]);
  const { fromHz, toHz } = view;
  const layout = useMemo(
    () => figureLayout({ range: { fromHz, toHz }, whole, scale: view.scale, plotHeightPx, drag, palette }),
    [fromHz, toHz, whole, view.scale, plotHeightPx, drag, palette],
  );
  return (
    <Plot
      data={data}
      layout={layout as Partial<Plotly.Layout>}
      config={CONFIG}
      useResizeHandler
      onInitialized={() => onState("ready")}
      onPurge={() => onState("waiting")}
      className="plotly-layer"
      // A box being drawn changes nothing until it is let go.
      onRelayouting={(event) => drag === "pan" && withRange(event, view.scale, onDrag)}
      onRelayout={(event) => withRange(event, view.scale, onRange)}
      onDoubleClick={() => onRange(whole)}
      onClick={(event) => {
        const at = event.points[0]?.x;
        const widthPx = (event.event?.target as Element | null)?.getBoundingClientRect().width;
        const id = typeof at === "number" && widthPx ? nearestDip(scene, at, widthPx) : null;
        if (id) onPick?.(id);
      }}
    />
  );
}

const CONFIG: Partial<Plotly.Config> = {
  displayModeBar: false,
  displaylogo: false,
  doubleClick: false,
  scrollZoom: false,
  showTips: false,
  showAxisDragHandles: false,
};

/** Calls back with the stretch that a change of the layout asks for, when it asks for one. */
function withRange(
  event: Readonly<Plotly.PlotRelayoutEvent>,
  scale: Scene["view"]["scale"],
  then: (range: FrequencyRange) => void,
) {
  const [from, to] = [event["xaxis.range[0]"], event["xaxis.range[1]"]];
  if (typeof from === "number" && typeof to === "number") {
    then({ fromHz: axisHz(from, scale), toHz: axisHz(to, scale) });
  }
}

function nearestDip(scene: Scene, axisAt: number, widthPx: number): string | null {
  const { scale, fromHz, toHz } = scene.view;
  const pxPer = widthPx / (axisValue(toHz, scale) - axisValue(fromHz, scale));
  const near = scene.dips
    .map(({ id, dip }) => ({ id, px: Math.abs(axisValue(dip.frequencyHz, scale) - axisAt) * pxPer }))
    .sort((a, b) => a.px - b.px)[0];
  return near && near.px <= PICK_PX ? near.id : null;
}
