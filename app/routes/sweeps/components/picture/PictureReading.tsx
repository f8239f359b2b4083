import { type KeyboardEvent, useMemo } from "react";
import type { ReadProblem } from "~/readers/reading";
import type { PictureErrors, PictureFields } from "../../picture.schema";
import type { PictureReadingData } from "../../picture-page.server";
import { TriedView } from "../TriedView";
import { PictureBoard } from "./PictureBoard";
import { PictureForm } from "./PictureForm";
import { usePictureFields } from "./use-picture-fields";

interface PictureReadingProps {
  data: PictureReadingData;
  base: string;
  errors: PictureErrors;
  mayEdit: boolean;
  /** Why it is not a sweep yet; what is missing takes the focus. */
  problem: ReadProblem | null;
}

/** How a picture was read, and every choice of it; the curve and its dips follow while one works. */
export function PictureReading({ data, base, errors, mayEdit, problem }: PictureReadingProps) {
  const { stored, fields: first, notes, assumed, zeroLines } = data;
  const state = usePictureFields(first, `${base}/reading/try`);
  const shown = state.tried ?? stored;
  const seen = shown.picture ?? stored.picture;
  const faults: PictureErrors = { ...state.errors, ...errors };
  const missing = useMemo(
    () => (problem ? missingField(stored.problem?.code ?? problem.code, first, notes) : null),
    [problem, stored, first, notes],
  );
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key.toLowerCase() !== "z" || !(event.ctrlKey || event.metaKey) || event.shiftKey) return;
    if (!state.undo) return;
    event.preventDefault();
    state.undo();
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: undo is heard wherever the focus is; its button is in the form
    <div className="reading-page picture-reading" onKeyDown={onKeyDown}>
      <div className="grid gap-6 content-start min-w-0">
        {problem && !stored.problem && (
          <p className="panel border-l-4 border-l-clay">
            {problem.message} Look it over{mayEdit && ", correct what is wrong, and press “Read it so”"}:
            until then it is no sweep.
          </p>
        )}
        {seen && (
          <PictureBoard
            src={`${base}/picture`}
            seen={seen}
            fields={state.fields}
            mayEdit={mayEdit}
            cornersFirst={missing === "x0"}
            set={state.set}
          />
        )}
        <TriedView tried={{ ...shown, reading: null }} busy={state.busy} />
        <Seen data={data} />
        {assumed.length > 0 && (
          <ul className="list-disc pl-5 text-small" aria-label="What the picture did not say">
            {assumed.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        )}
        <p className="text-small soft max-w-[72ch]">
          What is shown here, and what readers of the project can download, is the picture written anew
          without the place and camera data that a file may carry. The untouched original is for owners and
          experimenters only.
        </p>
      </div>
      <div className="grid gap-4 content-start min-w-0">
        {faults.form && (
          <p role="alert" className="text-alarm">
            {faults.form}
          </p>
        )}
        <PictureForm
          fields={state.fields}
          first={first}
          sources={notes?.sources ?? null}
          seen={seen}
          errors={faults}
          zeroLines={zeroLines}
          mayEdit={mayEdit}
          busy={state.busy}
          missing={missing}
          set={state.set}
          undo={state.undo}
          print={state.print}
        />
      </div>
    </div>
  );
}

/** What each stage saw when the picture was read, and how sure it was. */
function Seen({ data }: { data: PictureReadingData }) {
  const stages = data.notes?.stages ?? data.stored.picture?.stages;
  if (!stages) return null;
  return (
    <dl className="seen-stages text-small" aria-label="What was seen">
      {STAGES.map(({ id, word }) => (
        <div key={id}>
          <dt>{word}</dt>
          <dd>
            {stages[id].saw}{" "}
            <span className="soft font-mono">{Math.round(stages[id].confidence * 100)} %</span>
          </dd>
        </div>
      ))}
    </dl>
  );
}

const STAGES = [
  { id: "frame", word: "Plot" },
  { id: "axes", word: "Axes" },
  { id: "trace", word: "Trace" },
] as const;

function missingField(
  code: string | null,
  fields: PictureFields,
  notes: PictureReadingData["notes"],
): keyof PictureFields | null {
  if (code === "no-frame" || code === "corners-wrong") return "x0";
  if (code === "no-trace") return "traceColor";
  const empty = (["start", "stop", "top", "bottom"] as const).find((name) => fields[name] === "");
  if (empty) return empty;
  if (code === "zero-db-needed") return "zeroDb";
  const assumed = (["quantity", "scale"] as const).find((name) => notes?.sources?.[name] === "assumed");
  if (code === "axes-doubtful" && assumed) return assumed;
  const weakest = Object.entries(notes?.stages ?? {}).sort(
    (a, b) => a[1].confidence - b[1].confidence,
  )[0]?.[0];
  return weakest === "frame" ? "x0" : weakest === "trace" ? "traceColor" : "start";
}
