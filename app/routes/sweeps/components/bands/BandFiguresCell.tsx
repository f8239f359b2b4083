import type { BandFigures } from "~/measurement/band-figures";
import { bestWords, shareWords, swrWords } from "./band-words";

/** A band's figures in few lines, for a table with a column a sweep. */
export function BandFiguresCell({ figures }: { figures: BandFigures }) {
  const { swrLow, swrMiddle, swrHigh, shareUnder } = figures;
  if (shareUnder === null) return <span className="text-small soft">not swept</span>;
  return (
    <span className="grid gap-0.5">
      <span className="number text-small">best {bestWords(figures)}</span>
      <span className={`text-small ${shareUnder === 1 ? "text-moss" : shareUnder === 0 ? "text-clay" : ""}`}>
        {shareWords(figures)}
      </span>
      <span className="number text-tiny soft">
        {[swrLow, swrMiddle, swrHigh].map(swrWords).join(" · ")}
        <span className="sr-only"> at the lower edge, the middle and the upper edge</span>
      </span>
    </span>
  );
}
