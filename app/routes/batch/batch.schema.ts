import { z } from "zod";
import type { RowChange } from "~/services/batch/mend.server";

/** An id that a form chose for its batch, so that the same form sent twice begins one. */
export const batchIdSchema = z.string().regex(/^[23456789a-hjkmnp-z]{10}$/);

export const INTENTS = ["mend", "leave-out", "take", "add", "give-up"] as const;
export const intentSchema = z.enum(INTENTS);

/** Fields as `row-3-title`; a row counts where its name was sent. Undefined for what is no such form. */
export function parseChanges(form: FormData): RowChange[] | undefined {
  const names = [...form.keys()].flatMap((key) => /^row-(\d{1,4})-name$/.exec(key)?.[1] ?? []);
  const changes = names.map((index): RowChange | null => {
    const text = (field: string) => {
      const value = form.get(`row-${index}-${field}`);
      return typeof value === "string" ? value.trim().slice(0, LONGEST) : undefined;
    };
    const said = FIELDS.flatMap((field) => (text(field) === undefined ? [] : [[field, text(field)]]));
    const file = text("file");
    if (file && !/^\d{1,4}$/.test(file)) return null;
    return {
      row: Number(index),
      name: String(form.get(`row-${index}-name`)),
      wanted: Object.fromEntries(said),
      ...(file && { file: Number(file) }),
      leftOut: text("leftOut") === "yes",
      keepUnread: text("keepUnread") === "yes",
    };
  });
  return changes.some((change) => change === null) ? undefined : (changes as RowChange[]);
}

const FIELDS = ["title", "takenAt", "bench", "step"] as const;
const LONGEST = 300;
