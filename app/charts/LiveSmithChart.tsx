import { type ComponentType, lazy, Suspense, useEffect, useState } from "react";
import { useHydrated } from "~/components/ui/hydrated";
import { DragBar, type DragMode, type ZoomViewState } from "./DragBar";
import { SmithChart, type SmithChartProps, type SmithWindow, WHOLE_WINDOW } from "./SmithChart";
import type { SmithPlotlyProps } from "./SmithPlotly.client";

// Megabytes: fetched when somebody first turns to the chart, never with the page.
const SmithPlotly = lazy<ComponentType<SmithPlotlyProps>>(() =>
  import("./SmithPlotly.client").then(
    ({ SmithPlotly }) => ({ default: SmithPlotly }),
    () => ({ default: PlotlyMissing }),
  ),
);

/** The plane of Γ: drawn by the server, then read and zoomed with the pointer. */
export function LiveSmithChart(props: Omit<SmithChartProps, "window" | "palette" | "children">) {
  const [drag, setDrag] = useState<DragMode | null>(null);
  const [window, setWindow] = useState<SmithWindow>(WHOLE_WINDOW);
  const [state, setState] = useState<ZoomViewState>("waiting");
  const live = useHydrated() && (drag === "zoom" || drag === "move");
  return (
    <div>
      <div className="live-bar no-print">
        <DragBar drag={drag ?? "off"} onDrag={setDrag} state={live && state !== "failed" ? state : null} />
        {live && state === "failed" && (
          <p role="status" className="text-small soft">
            The zooming view could not be fetched. The drawing and the table hold the same numbers.
          </p>
        )}
        {window.half < WHOLE_WINDOW.half && (
          <button
            type="button"
            className="button button-quiet button-small"
            onClick={() => setWindow(WHOLE_WINDOW)}
          >
            Show all of it
          </button>
        )}
      </div>
      <div onPointerEnter={(event) => event.pointerType === "mouse" && drag === null && setDrag("zoom")}>
        <SmithChart {...props} window={window}>
          {live && (
            <Suspense fallback={null}>
              <SmithPlotly
                points={props.points}
                referenceOhm={props.referenceOhm}
                window={window}
                drag={drag === "move" ? "pan" : "zoom"}
                onWindow={(asked) => setWindow(asked ?? WHOLE_WINDOW)}
                onState={setState}
              />
            </Suspense>
          )}
        </SmithChart>
      </div>
    </div>
  );
}

/** In place of a view that could not be fetched: the drawing stays as it is. */
function PlotlyMissing({ onState }: Pick<SmithPlotlyProps, "onState">) {
  useEffect(() => onState("failed"), [onState]);
  return null;
}
