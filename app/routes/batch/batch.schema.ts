import { z } from "zod";
import type { RowChange } from "~/services/batch/mend.server";

/** An id that a form chose for its batch, so that the same form sent twice begins one. */
export const batchIdSchema = z.string().regex(/^[23456789a-hjkmnp-z]{10}$/);

export const INTENTS = ["mend", "leave-out", "take", "add", "give-up"] as const;
export const intentSchema = z.enum(INTENTS);

/** Fields as `row-3-title`; a row counts where its name was sent. Undefined for what is no such form. */
export function parseChanges(form: FormData): RowChange[] | undefined {
  // Looked up once: asking the form for each field goes through all of it each time.
  const fields = new Map([...form].reverse());
  const names = new Set([...fields.keys()].flatMap((key) => /^row-(\d{1,4})-name$/.exec(key)?.[1] ?? []));
  const changes = [...names].reverse().map((index): RowChange | null => {
    const text = (field: string) => {
      const value = fields.get(`row-${index}-${field}`);
      return typeof value === "string" ? value.trim().slice(0, LONGEST) : undefined;
    };
    const said = FIELDS.flatMap((field) => (text(field) === undefined ? [] : [[field, text(field)]]));
    const file = text("file");
    if (file && !/^\d{1,4}$/.test(file)) return null;
    return {
      row: Number(index),
      name: String(fields.get(`row-${index}-name`)),
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
