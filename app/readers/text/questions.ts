import type { Choice, Question, TextQuantity, TextSpec } from "../reading.ts";
import type { Candidate } from "./candidates.ts";
import { TWO_COLUMNS } from "./choose.ts";
import type { Segment } from "./segments.ts";

const QUANTITY_WORDS: Record<TextQuantity, string> = {
  "s11-db": "S11 in dB (dips go down)",
  "return-loss": "return loss in dB (dips go up)",
  swr: "SWR",
  level: "level, to be referred to a 0 dB line",
  magnitude: "magnitude of Γ, 0 to 1",
  "magnitude-angle": "magnitude and angle of Γ",
  "db-angle": "S11 in dB and angle",
  "real-imaginary": "real and imaginary part of Γ",
  "resistance-reactance": "resistance and reactance",
  "impedance-angle": "magnitude and angle of Z",
};
/** Below this a quantity or unit counts as open, and is asked. */
const SURE = 0.75;

interface Open {
  candidates: Candidate[];
  chosen: Candidate;
  unitConfidence: number;
  blocks: Segment[];
  spec: TextSpec;
  /** Crest of the levels, dB; null where they are no levels. */
  crestDb: number | null;
}

/** What the file leaves open, each with the choice that was used. */
export function textQuestions({
  candidates,
  chosen,
  unitConfidence,
  blocks,
  spec,
  crestDb,
}: Open): Question[] {
  const questions: Question[] = [];
  if (candidates.length > 1)
    questions.push({
      id: "trace",
      text: "The file holds several traces. Which one is the reflection?",
      choices: candidates.map((c) => ({
        value: traceValue(c),
        label: `${c.label} (${QUANTITY_WORDS[c.quantity]})`,
      })),
      proposed: traceValue(chosen),
    });
  if (chosen.confidence < SURE)
    questions.push({
      id: "quantity",
      text: "The file does not say for certain what the values are. What are they?",
      choices: quantities(chosen),
      proposed: chosen.quantity,
    });
  if (unitConfidence < SURE)
    questions.push({
      id: "frequency-unit",
      text: "The file does not name the unit of its frequencies. Which is it?",
      choices: ["Hz", "kHz", "MHz", "GHz"].map((value) => ({ value, label: value })),
      proposed: spec.frequencyUnit,
    });
  if (blocks.length > 1)
    questions.push({
      id: "block",
      text: "The file holds several tables. Which one is the sweep?",
      choices: blocks.map((b) => ({
        value: String(b.firstLine),
        label: `from line ${b.firstLine}, ${b.rows} rows`,
      })),
      proposed: String(spec.firstDataLine),
    });
  if (spec.quantity === "level")
    questions.push({
      id: "zero-db",
      text: "Which level is full reflection (the bridge with its port open or shorted), in dB?",
      choices:
        crestDb === null ? [] : [{ value: String(crestDb), label: `${crestDb} dB, the crest of this sweep` }],
      proposed: spec.zeroDb === null ? null : String(spec.zeroDb),
    });
  return questions;
}

/** What choosing `value` as the answer to a text question fixes. */
export function textAnswer(id: string, value: string): Partial<TextSpec> {
  if (id === "trace") {
    const [frequency, column, second, quantity] = value.split(":");
    return {
      frequencyColumn: Number(frequency),
      valueColumn: Number(column),
      secondColumn: second === "" ? null : Number(second),
      quantity: quantity as TextQuantity,
    };
  }
  if (id === "quantity") return { quantity: value as TextQuantity };
  if (id === "frequency-unit") return { frequencyUnit: value as TextSpec["frequencyUnit"] };
  if (id === "block") return { firstDataLine: Number(value) };
  return id === "zero-db" ? { zeroDb: Number(value) } : {};
}

function traceValue(c: Candidate): string {
  return [c.frequencyColumn, c.valueColumn, c.secondColumn ?? "", c.quantity].join(":");
}

function quantities(chosen: Candidate): Choice[] {
  const two = chosen.secondColumn !== null;
  return (Object.keys(QUANTITY_WORDS) as TextQuantity[])
    .filter((q) => TWO_COLUMNS.has(q) === two)
    .map((value) => ({ value, label: QUANTITY_WORDS[value] }));
}
