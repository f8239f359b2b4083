import { settingsSchema } from "~/routes/sweeps/sweeps.schema";

/** A comparison as it stands in an address: `?sweep=…&sweep=…&reference=…&view=swr&axis=log&from=6&to=8`. */
export interface CompareView {
  /** Public ids in the order shown; each once, at most MOST_COMPARED. */
  sweeps: string[];
  /** Public id of the sweep that the others are held against; null: the first. */
  reference: string | null;
  quantity: "rl" | "swr";
  /** Null: logarithmic where the sweeps span enough for it. */
  scale: "linear" | "log" | null;
  /** Hz; null for the end of all sweeps. */
  fromHz: number | null;
  toHz: number | null;
  /** SWR limit of bands that have none of their own; null for the usual one. */
  swrLimit: number | null;
  /** Words that sweeps to choose from are looked for by. */
  words: string;
}

/** Reads the comparison from an address; what makes no sense is left at its default. */
export function parseCompare(search: URLSearchParams): CompareView {
  const megahertz = (name: string) => {
    const n = Number(search.get(name) || Number.NaN);
    return Number.isFinite(n) && n >= 0 ? n * 1e6 : null;
  };
  const [fromHz, toHz] = [megahertz("from"), megahertz("to")];
  const backwards = fromHz !== null && toHz !== null && fromHz >= toHz;
  const axis = search.get("axis");
  const limit = settingsSchema.shape.swrLimit.safeParse(search.get("limit") ?? undefined);
  return {
    sweeps: [...new Set(search.getAll("sweep").filter((id) => ID.test(id)))].slice(0, MOST_COMPARED),
    reference: search.get("reference"),
    quantity: search.get("view") === "swr" ? "swr" : "rl",
    scale: axis === "linear" || axis === "log" ? axis : null,
    fromHz: backwards ? null : fromHz,
    toHz: backwards ? null : toHz,
    swrLimit: limit.success ? limit.data : null,
    words: (search.get("q") ?? "").trim().slice(0, 100),
  };
}

/** How many sweeps the address names beyond those that are compared. */
export function countLeftOut(search: URLSearchParams): number {
  return Math.max(0, new Set(search.getAll("sweep").filter((id) => ID.test(id))).size - MOST_COMPARED);
}

/** The address's search with some of the comparison changed; `?` for an empty one. */
export function compareSearch(view: CompareView, change: Partial<CompareView> = {}): string {
  return `?${new URLSearchParams(compareFields({ ...view, ...change }))}`;
}

/** The comparison as name and value, for addresses and forms; defaults are left out. */
export function compareFields(view: CompareView): [string, string][] {
  const { sweeps, reference, quantity, scale, fromHz, toHz, swrLimit, words } = view;
  const fields: [string, string | null][] = [
    ...sweeps.map((id): [string, string] => ["sweep", id]),
    ["reference", reference !== null && reference !== sweeps[0] ? reference : null],
    ["view", quantity === "swr" ? "swr" : null],
    ["axis", scale],
    ["from", fromHz === null ? null : shown(fromHz)],
    ["to", toHz === null ? null : shown(toHz)],
    ["limit", swrLimit === null ? null : String(swrLimit)],
    ["q", words || null],
  ];
  return fields.filter((field): field is [string, string] => field[1] !== null);
}

/** The sweep that a pasted address (or a bare id) names; null where it names none. */
export function sweepInAddress(text: string): string | null {
  const plain = text.trim();
  if (ID.test(plain)) return plain;
  return /\/sweeps\/([\w-]{4,32})(?=[/?#.]|$)/.exec(plain)?.[1] ?? null;
}

/** MHz to the hertz and no trailing zeros. */
function shown(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}

const ID = /^[\w-]{4,32}$/;
/** As many lines as have a look of their own (app/charts/trace-styles.ts). */
export const MOST_COMPARED = 12;
