import { createContext, type ReactNode, useContext, useMemo, useState } from "react";
import type { SweepPart } from "./parts.ts";

export type Picking = "stretch" | "region";

interface Marks {
  /** The part of which the focused note speaks. */
  shown: SweepPart | null;
  show: (part: SweepPart | null) => void;
  /** What is being chosen by dragging now. */
  picking: Picking | null;
  pick: (what: Picking | null) => void;
  /** What was chosen for the note that is being written. */
  picked: SweepPart;
  setPicked: (part: SweepPart) => void;
}

const NOTHING: SweepPart = { stretch: null, region: null };
const MarksContext = createContext<Marks | null>(null);

/** Lets the notes of a page and its chart and picture show each other's parts. */
export function MarksProvider({ children }: { children: ReactNode }) {
  const [shown, show] = useState<SweepPart | null>(null);
  const [picking, pick] = useState<Picking | null>(null);
  const [picked, setPicked] = useState<SweepPart>(NOTHING);
  const marks = useMemo(() => ({ shown, show, picking, pick, picked, setPicked }), [shown, picking, picked]);
  return <MarksContext value={marks}>{children}</MarksContext>;
}

/** Null on pages without a chart or picture that notes speak of. */
export function useMarks(): Marks | null {
  return useContext(MarksContext);
}
