import { type PictureStage, STAGES } from "~/services/seen-picture";

/** How far the reading of a picture is. */
export function PictureStages({ done }: { done: PictureStage }) {
  const count = STAGES.indexOf(done) + 1;
  return (
    <ol className="picture-stages" aria-label="Stages of the reading">
      {STAGES.map((stage, i) => (
        <li key={stage} data-done={i < count}>
          {i < count ? WORDS[stage].done : WORDS[stage].next}
        </li>
      ))}
    </ol>
  );
}

const WORDS: Record<PictureStage, { done: string; next: string }> = {
  decoded: { done: "opened", next: "open" },
  frame: { done: "plot found", next: "find the plot" },
  axes: { done: "axes read", next: "read the axes" },
  trace: { done: "trace followed", next: "follow the trace" },
  dips: { done: "dips found", next: "find the dips" },
};
