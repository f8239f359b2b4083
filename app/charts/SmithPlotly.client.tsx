import Plotly from "plotly.js-dist-min";
import { useMemo } from "react";
import createPlotlyComponent from "react-plotly.js/factory";
import type { ZoomViewState } from "./DragBar";
import { usePageColours } from "./page-colours";
import type { SmithWindow } from "./SmithChart";
import { smithFigure, windowIn } from "./smith-figure";
import type { ComplexPoints } from "./smith-trace";

const Plot = createPlotlyComponent(Plotly);

export interface SmithPlotlyProps {
  points: ComplexPoints;
  referenceOhm: number;
  window: SmithWindow;
  drag: "zoom" | "pan";
  onWindow: (window: SmithWindow | null) => void;
  onState: (state: ZoomViewState) => void;
}

/** Reads out the line under the pointer and zooms; lies over the drawing, which follows its window. */
export function SmithPlotly({ points, referenceOhm, window, drag, onWindow, onState }: SmithPlotlyProps) {
  const palette = usePageColours();
  const { data, layout } = useMemo(
    () => smithFigure({ points, referenceOhm, window, drag, palette }),
    [points, referenceOhm, window, drag, palette],
  );
  return (
    <Plot
      data={[...data] as Plotly.Data[]}
      layout={layout as Partial<Plotly.Layout>}
      config={CONFIG}
      useResizeHandler
      className="smith-live"
      onInitialized={() => onState("ready")}
      onPurge={() => onState("waiting")}
      onRelayouting={(event) => drag === "pan" && tell(event, onWindow)}
      onRelayout={(event) => tell(event, onWindow)}
      onDoubleClick={() => onWindow(null)}
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

function tell(event: Readonly<Plotly.PlotRelayoutEvent>, onWindow: (window: SmithWindow) => void) {
  const window = windowIn(event as Record<string, unknown>);
  if (window) onWindow(window);
}
