import { planeWords } from "~/routes/sweeps/correction-words";
import type { ComparedSweep } from "~/services/compare.server";

type Kind = Pick<ComparedSweep, "sweep" | "reading" | "analysis">;

/** The names of the sweeps, in their order. */
export const LETTERS = "ABCDEFGHIJKL";

/** What the sweeps do not have in common, a sentence each: whoever reads a difference must know what else is in it. */
export function differencesInKind(compared: readonly Kind[]): string[] {
  if (compared.length < 2) return [];
  const say = (start: string, pick: (one: Kind) => string, end: string) => {
    const groups = new Map<string, string[]>();
    for (const [i, one] of compared.entries()) {
      const value = pick(one);
      groups.set(value, [...(groups.get(value) ?? []), LETTERS[i]]);
    }
    if (groups.size < 2) return [];
    const words = [...groups].map(([value, letters]) => `${listed(letters)} ${value}`);
    return [`${start}: ${words.join("; ")}. ${end}`];
  };
  return [
    ...say(
      "Not at one plane",
      ({ analysis }) => planeWords(analysis?.correction ?? null),
      "What lies between the planes is in every difference.",
    ),
    ...say(
      "Not with one bench",
      ({ analysis }) => {
        const bench = analysis?.correction?.bench;
        return bench ? `“${bench.name}”, version ${bench.number}` : "without a bench";
      },
      "Their errors differ, and differences hold that too.",
    ),
    ...say(
      "Not of one quantity",
      ({ reading }) => QUANTITIES[reading?.reading?.quantity ?? "unknown"] ?? "unknown",
      "All are drawn as the reflection that they stand for.",
    ),
    ...say(
      "Not to one reference impedance",
      ({ sweep }) => (sweep.referenceOhm === null ? "unknown" : `${sweep.referenceOhm}\u2009Ω`),
      "Return loss and SWR are each against its own, and do not compare.",
    ),
    ...say(
      "Not of one kind",
      ({ reading }) =>
        reading?.reading?.format === "screenshot" ? "read from a picture" : "a file of numbers",
      "A picture's pixels limit how closely it can be held against the rest.",
    ),
  ];
}

function listed(letters: readonly string[]): string {
  return letters.length < 2 ? letters.join() : `${letters.slice(0, -1).join(", ")} and ${letters.at(-1)}`;
}

const QUANTITIES: Record<string, string> = {
  "s11-db": "S11 in dB",
  "return-loss": "return loss",
  swr: "SWR",
  level: "a level against its 0 dB line",
  gamma: "complex reflection",
  impedance: "impedance",
  unknown: "unknown",
};
