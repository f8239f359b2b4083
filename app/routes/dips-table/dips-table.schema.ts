import { z } from "zod";
import { parseSort } from "~/components/ui/sort";
import { DIP_ORDERS, type DipOrder } from "~/db/dip-table.server";
import type { DipsAsked } from "~/services/dips-table/table.server";
import { searchWords } from "~/services/search-question";

/** A number as a person writes it; null where the field is empty or holds none. */
const number = z
  .string()
  .transform((text) => text.trim().replace(",", "."))
  .transform((text) => (/^\d*\.?\d+$/.test(text) && Number(text) < 1e6 ? Number(text) : null))
  .nullable()
  .default(null);

/** The filters in the address. What makes no sense filters nothing; the form says so beside its field. */
const schema = z.object({
  from: number,
  to: number,
  under: number,
  band: z.string().max(60).catch("").default(""),
  verdict: z.enum(["open", "proposed", "settled"]).nullable().catch(null).default(null),
  sweep: z.string().max(16).catch("").default(""),
  q: z.string().max(200).catch("").default(""),
  page: z.coerce.number().int().min(1).max(2000).catch(1).default(1),
});

export interface AskedTable {
  asked: DipsAsked;
  order: DipOrder;
  page: number;
  /** As it was typed, for the form. */
  typed: Record<string, string>;
  /** Beside the fields whose text is no number. */
  errors: Partial<Record<"from" | "to" | "under", string[]>>;
  filtered: boolean;
}

export function parseTable(search: URLSearchParams): AskedTable {
  const typed = Object.fromEntries([...search].filter(([, text]) => text !== ""));
  const values = schema.parse(typed);
  const hz = (mhz: number | null) => (mhz === null ? null : Number((mhz * 1e6).toFixed(3)));
  const [low, high] = [hz(values.from), hz(values.to)];
  const swap = low !== null && high !== null && low > high;
  const errors: AskedTable["errors"] = {};
  for (const name of ["from", "to", "under"] as const) {
    if (typed[name] !== undefined && values[name] === null) errors[name] = [WORDS[name]];
  }
  return {
    asked: {
      fromHz: swap ? high : low,
      toHz: swap ? low : high,
      swrUnder: values.under,
      verdict: values.verdict,
      sweep: values.sweep || null,
      words: searchWords(values.q),
      band: values.band,
    },
    order: parseSort(search.get("sort"), DIP_ORDERS, { key: "taken", direction: "descending" }) as DipOrder,
    page: values.page,
    typed,
    errors,
    filtered: FILTERS.some((name) => typed[name] !== undefined),
  };
}

/** The address's search on another page of the table. */
export function onPage(typed: Record<string, string>, page: number): string {
  const { page: _, ...rest } = typed;
  const search = new URLSearchParams(page > 1 ? { ...rest, page: String(page) } : rest);
  return `?${search}`;
}

const FILTERS = ["from", "to", "under", "band", "verdict", "sweep", "q"];
const WORDS = {
  from: "A frequency in MHz, such as 7 or 7.1. It filters nothing now.",
  to: "A frequency in MHz, such as 7.2 or 30. It filters nothing now.",
  under: "A number such as 1.5. It filters nothing now.",
};
