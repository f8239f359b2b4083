import { Unfold } from "~/components/notes/Unfold";
import type { Evidence } from "~/db/schema";

export interface EvidenceChoiceProps {
  evidence: { key: string; kind: Evidence["kind"]; text: string }[];
}

/** What the verdict rests on, to be ticked: causes, the trail's dips, steps, sweeps, notes. */
export function EvidenceChoice({ evidence }: EvidenceChoiceProps) {
  if (evidence.length === 0) return null;
  const groups = KINDS.map(({ kind, words }) => ({
    words,
    items: evidence.filter((one) => one.kind === kind),
  })).filter(({ items }) => items.length > 0);
  const boxes = (
    <div className="evidence-choice">
      {groups.map(({ words, items }) => (
        <fieldset key={words}>
          <legend>{words}</legend>
          {items.map(({ key, text }) => (
            <label key={key}>
              <input type="checkbox" name="evidence" value={key} /> <span>{text}</span>
            </label>
          ))}
        </fieldset>
      ))}
    </div>
  );
  return (
    <Unfold label="On what evidence" about="the verdict rests" bare={boxes}>
      {() => boxes}
    </Unfold>
  );
}

const KINDS = [
  { kind: "cause", words: "Reckoned" },
  { kind: "dip", words: "Dips on its trail" },
  { kind: "step", words: "Steps" },
  { kind: "sweep", words: "Sweeps" },
  { kind: "note", words: "Notes" },
] as const;
