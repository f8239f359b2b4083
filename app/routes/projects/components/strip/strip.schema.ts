/** The strip map's view as it stands in an address: `?axis=linear&from=6&to=8&hide=…`. */
export interface StripView {
  /** Null: logarithmic where the sweeps span enough for it. */
  scale: "linear" | "log" | null;
  /** Hz; null for the end of all sweeps. */
  fromHz: number | null;
  toHz: number | null;
  /** Public ids of sweeps that are left out. */
  hide: string[];
}

/** Reads the view from an address; what makes no sense is left at its default. */
export function parseStripView(search: URLSearchParams): StripView {
  const megahertz = (name: string) => {
    const text = search.get(name);
    const n = text ? Number(text) : Number.NaN;
    return Number.isFinite(n) && n >= 0 ? n * 1e6 : null;
  };
  const axis = search.get("axis");
  const [fromHz, toHz] = [megahertz("from"), megahertz("to")];
  const backwards = fromHz !== null && toHz !== null && fromHz >= toHz;
  return {
    scale: axis === "linear" || axis === "log" ? axis : null,
    fromHz: backwards ? null : fromHz,
    toHz: backwards ? null : toHz,
    hide: search.getAll("hide").slice(0, MOST_HIDDEN),
  };
}

/** The address's search with some of the view changed; `?` for none of it. */
export function stripSearch(view: StripView, change: Partial<StripView>): string {
  const next = { ...view, ...change };
  const search = new URLSearchParams();
  if (next.scale) search.set("axis", next.scale);
  if (next.fromHz !== null) search.set("from", shown(next.fromHz));
  if (next.toHz !== null) search.set("to", shown(next.toHz));
  for (const id of next.hide) search.append("hide", id);
  return `?${search}`;
}

/** MHz to the kilohertz and no trailing zeros. */
function shown(hz: number): string {
  return String(Number((hz / 1e6).toFixed(3)));
}

const MOST_HIDDEN = 200;
