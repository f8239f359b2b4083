import { useEffect } from "react";
import { Link, useLocation } from "react-router";
import { useMarks } from "./marks.tsx";
import { mhzOf, type SweepPart, stretchWords } from "./parts.ts";

/** Of which part of the sweep a note speaks; a stretch is gone to, with some of what lies around it. */
export function PartLink({ part: { stretch, region } }: { part: SweepPart }) {
  const { search } = useLocation();
  if (!stretch) return region && <span className="text-small">on a part of the picture</span>;
  const query = new URLSearchParams(search);
  const margin = stretch.toHz - stretch.fromHz;
  query.set("from", mhzOf(Math.max(0, stretch.fromHz - margin)));
  query.set("to", mhzOf(stretch.toHz + margin));
  return (
    <Link to={`?${query}`} preventScrollReset className="text-small font-mono">
      on {stretchWords(stretch)}
    </Link>
  );
}

/** Handlers with which a note shows its part on the chart or the picture while it is pointed at, focused or chosen. */
export function usePartShown(part: SweepPart | null, chosen: boolean) {
  const marks = useMarks();
  const show = marks?.show;
  // biome-ignore lint/correctness/useExhaustiveDependencies: a part read anew is the same part
  useEffect(() => {
    if (!chosen || !part || !show) return;
    show(part);
    return () => show(null);
  }, [chosen, show]);
  if (!part || !show) return {};
  const on = () => show(part);
  const off = () => show(null);
  return { onPointerEnter: on, onPointerLeave: off, onFocus: on, onBlur: off };
}
