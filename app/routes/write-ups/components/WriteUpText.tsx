import type { ReactNode, RefObject } from "react";
import { asReference } from "~/components/notes/naming";
import { Suggestions } from "~/components/notes/Suggestions";
import { useSuggestions } from "~/components/notes/use-suggestions";
import { useHydrated } from "~/components/ui/hydrated";

export interface WriteUpTextProps {
  projectId: string;
  text: string;
  change: (text: string) => void;
  field: RefObject<HTMLTextAreaElement | null>;
  hint: ReactNode;
  errors?: string[];
}

/** The text of a write-up: completes what it names, and takes a pasted address of the project as a reference. */
export function WriteUpText({ projectId, text, change, field, hint, errors }: WriteUpTextProps) {
  const naming = useSuggestions(projectId, text, change);
  const hydrated = useHydrated();
  return (
    <div className="field">
      <label htmlFor="write-up-body">Text</label>
      <textarea
        ref={field}
        id="write-up-body"
        name="body"
        rows={24}
        className="control"
        spellCheck
        aria-describedby={errors?.[0] ? "write-up-error write-up-hint" : "write-up-hint"}
        aria-invalid={errors?.[0] ? true : undefined}
        value={text}
        onChange={(event) => {
          change(event.currentTarget.value);
          naming.look(event.currentTarget);
        }}
        onClick={(event) => naming.look(event.currentTarget)}
        onBlur={naming.close}
        onPaste={(event) => {
          const pasted = event.clipboardData.getData("text/plain");
          const reference = asReference(pasted, location.origin, projectId);
          const { selectionStart: from, selectionEnd: to } = event.currentTarget;
          if (!reference) return;
          event.preventDefault();
          change(`${text.slice(0, from)}${reference}${text.slice(to)}`);
        }}
        {...(hydrated ? naming.field : {})}
        onKeyDown={(event) => {
          if (naming.take(event)) return;
          if ((event.ctrlKey || event.metaKey) && event.key === "Enter") {
            event.currentTarget.form?.querySelector<HTMLButtonElement>('button[value="keep"]')?.click();
          }
        }}
      />
      <p id="write-up-hint" className="field-hint">
        {hint}
      </p>
      {errors?.[0] && (
        <p id="write-up-error" className="field-error">
          {errors[0]}
        </p>
      )}
      {naming.suggestions.length > 0 && (
        <Suggestions
          id={naming.id}
          suggestions={naming.suggestions}
          chosen={naming.chosen}
          onPick={naming.pick}
        />
      )}
    </div>
  );
}
