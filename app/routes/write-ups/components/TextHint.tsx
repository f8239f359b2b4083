import { MAX_WRITE_UP_CHARACTERS } from "~/services/note-limits";

/** Says how to write while there is room, and how much is left where it gets tight. */
export function TextHint({ text, restored }: { text: string; restored: boolean }) {
  const left = MAX_WRITE_UP_CHARACTERS - text.length;
  if (left < NEAR_LIMIT) {
    return (
      <span role="status" className={left < 0 ? "text-alarm" : undefined}>
        {left < 0 ? `${-left} characters too many` : `${left} characters left`}
      </span>
    );
  }
  if (restored) return "You began this earlier on this device; it was not kept yet.";
  return (
    <>
      Markdown, with footnotes <code>[^1]</code> and formulas <code>$\lambda/4$</code>; <code>#</code> names a
      dip, a sweep, a step or a plate. A figure is a line of its own: <code>![caption](#dip:…)</code>.
    </>
  );
}

const NEAR_LIMIT = 1000;
