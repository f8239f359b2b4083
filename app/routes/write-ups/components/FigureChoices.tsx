import type { RefObject } from "react";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";
import type { FigureChoice } from "~/services/write-ups/choices.server";

export interface FigureChoicesProps {
  choices: FigureChoice[];
  text: string;
  change: (text: string) => void;
  field: RefObject<HTMLTextAreaElement | null>;
}

/** What of the project can be put in as a figure: a press writes its line where the caret stands. */
export function FigureChoices({ choices, text, change, field }: FigureChoicesProps) {
  const hydrated = useHydrated();
  if (choices.length === 0) {
    return (
      <p className="text-small soft">
        There is nothing to put in as a figure yet: sweeps, their dips and plates of this project can be.
      </p>
    );
  }
  const put = ({ subject }: FigureChoice) => {
    const at = field.current?.selectionStart ?? text.length;
    const [before, after] = [text.slice(0, at).replace(/\n+$/, ""), text.slice(at).replace(/^\n+/, "")];
    const line = `![](#${subject})`;
    change(`${before}${before === "" ? "" : "\n\n"}${line}\n\n${after}`);
    field.current?.focus();
  };
  return (
    <details>
      <summary>Put a figure in</summary>
      <ul className="figure-choices mt-2">
        {choices.map((choice) => (
          <li key={choice.subject} className="flex flex-wrap items-center justify-between gap-x-3 text-small">
            <span className="min-w-0">
              <span className="soft">{choice.kind}</span> {choice.words}
            </span>
            {hydrated ? (
              <Button
                type="button"
                variant="quiet"
                size="small"
                onClick={() => put(choice)}
                aria-label={`Put in: ${choice.kind} ${choice.words}`}
              >
                Put it in
              </Button>
            ) : (
              <code>{`![](#${choice.subject})`}</code>
            )}
          </li>
        ))}
      </ul>
    </details>
  );
}
