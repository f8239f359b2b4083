import { useHydrated } from "~/components/ui/hydrated";

export type DragMode = "off" | "zoom" | "move";

/** Of the view that zooms: being fetched, drawn, or not to be had. */
export type ZoomViewState = "waiting" | "ready" | "failed";

export interface DragBarProps {
  drag: DragMode;
  onDrag: (drag: DragMode) => void;
  /** Null while nobody asked for it. */
  state: ZoomViewState | null;
}

/** What dragging on the chart does. On a touch screen it is off until asked for, so that the page scrolls. */
export function DragBar({ drag, onDrag, state }: DragBarProps) {
  if (!useHydrated()) return null;
  return (
    // biome-ignore lint/a11y/useSemanticElements: two buttons, not a form
    <div role="group" aria-label="Dragging on the chart" className="drag-bar">
      {(["zoom", "move"] as const).map((mode) => (
        <button
          key={mode}
          type="button"
          aria-pressed={drag === mode}
          onClick={() => onDrag(drag === mode ? "off" : mode)}
        >
          {mode === "zoom" ? "Drag to zoom" : "Drag to move"}
        </button>
      ))}
      <span role="status" className="soft">
        {state === "waiting" && "Fetching the zooming view"}
        {state === "failed" && "The zooming view could not be fetched. The buttons on the left still work."}
      </span>
    </div>
  );
}
