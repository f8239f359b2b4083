import type { Conflict } from "~/components/edit-conflict/EditConflict";
import type { StepWas } from "~/services/steps.server";
import { rowsOf, type StepTexts, type TargetOption } from "./step-form";

interface TwoSteps {
  /** As the later of two people sent it. */
  sent: StepTexts;
  /** As it is stored now. */
  theirs: StepTexts;
  conflicts: readonly (keyof StepWas)[];
  /** What only the later one changed. */
  mine: readonly (keyof StepWas)[];
  now: StepWas;
  confirmed: boolean;
}

/** The question to the later of two who changed one step; the quantities are one thing, in one field. */
export function stepConflict({ sent, theirs, conflicts, mine, now, confirmed }: TwoSteps): Conflict {
  const [ours, stored] = [fieldsOf(sent), fieldsOf(theirs)];
  const others = FIELDS.filter((name) => !conflicts.includes(name));
  const rest = others.map((name) => [name, mine.includes(name) ? ours[name] : stored[name]]);
  return {
    asked: conflicts.map((name) => ({ name, mine: ours[name], theirs: stored[name] })),
    rest: { ...Object.fromEntries(rest), state: sent.state, ...(confirmed && { confirm: "on" }) },
    was: JSON.stringify(now),
  };
}

/** Quantities of one field as lines to read: "Reed pole, length: 10.04". */
export function quantityLines(field: string, targets: readonly TargetOption[]): string {
  const lines = rowsOf(field).map(({ target, label, unit, from, to }) => {
    const name =
      targets.find(({ value }) => value === target)?.label.replace(/ \([^()]*\)$/, "") ?? label ?? "";
    return `${name}: ${[from, to].filter(Boolean).join(" → ")}${unit ? ` ${unit}` : ""}`;
  });
  return lines.join("\n");
}

function fieldsOf({ title, body, at, quantities }: StepTexts): Record<keyof StepWas, string> {
  const said = quantities.filter((row) => Object.values(row).some((text) => text?.trim()));
  return { title, body, at, quantities: JSON.stringify(said) };
}

const FIELDS = ["title", "body", "at", "quantities"] as const;
