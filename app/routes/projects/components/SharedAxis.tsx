import { frequencyAxis, frequencyScale } from "~/charts/axis";
import { FrequencyAxisMarks } from "~/charts/FrequencyAxisMarks";
import { PAGE_PALETTE } from "~/charts/palette";

/** The axis that all strips of a project stand on. */
export function SharedAxis({ fromHz, toHz }: { fromHz: number; toHz: number }) {
  const axis = frequencyAxis(frequencyScale("log", fromHz, toHz));
  return (
    <div className="chart-frame">
      <div className="shared-axis">
        <svg width="100%" height="24" overflow="visible" aria-hidden="true">
          <FrequencyAxisMarks frequency={axis} y={1} plotWidthPx={null} palette={PAGE_PALETTE} />
        </svg>
        <p className="number soft">MHz, logarithmic</p>
      </div>
    </div>
  );
}
