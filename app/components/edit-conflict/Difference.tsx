import { difference, type Part } from "./difference.ts";
import "./edit-conflict.css";

/** One of two texts with what only it says marked; the mark is underlined too, so that it does not hang on colour. */
export function Difference({ text, against }: { text: string; against: string }) {
  const [parts] = difference(text, against);
  if (text === "") return <span className="soft">nothing</span>;
  return (
    <span className="whitespace-pre-wrap break-words">
      {numbered(parts).map(([key, { text: words, own }]) =>
        own ? (
          <mark key={key} className="own-words">
            {words}
          </mark>
        ) : (
          <span key={key}>{words}</span>
        ),
      )}
    </span>
  );
}

function numbered(parts: Part[]): [number, Part][] {
  return [...parts.entries()];
}
