/** One thing that a note can name: what is written for it, and what a person sees of it. */
export interface Suggestion {
  insert: string;
  label: string;
  detail: string;
}

/** What the words at the caret may mean: a list under the field, moved through from it. */
export function Suggestions({
  id,
  suggestions,
  chosen,
  onPick,
}: {
  id: string;
  suggestions: Suggestion[];
  chosen: number;
  onPick: (suggestion: Suggestion) => void;
}) {
  return (
    <div id={id} role="listbox" aria-label="What can be named here" className="suggestions">
      {suggestions.map((suggestion, i) => (
        <div
          key={suggestion.insert}
          id={`${id}-${i}`}
          role="option"
          tabIndex={-1}
          aria-selected={i === chosen}
          className="suggestion"
          // The field keeps the focus.
          onMouseDown={(event) => {
            event.preventDefault();
            onPick(suggestion);
          }}
        >
          <span>{suggestion.label}</span>
          <span className="soft text-small">{suggestion.detail}</span>
        </div>
      ))}
    </div>
  );
}
