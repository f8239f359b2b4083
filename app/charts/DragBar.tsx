import { useHydrated } from "~/components/ui/hydrated";

export type DragMode = "off" | "zoom" | "move";

export interface DragBarProps {
  drag: DragMode;
  onDrag: (drag: DragMode) => void;
  /** The zooming view is on its way. */
  waiting: boolean;
}

/** What dragging on the chart does. On a touch screen it is off until asked for, so that the page scrolls. */
export function DragBar({ drag, onDrag, waiting }: DragBarProps) {
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
        {waiting ? "Fetching the zooming view" : ""}
      </span>
    </div>
  );
}
