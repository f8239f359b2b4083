import type { FieldMetadata } from "@conform-to/react";
import { type ReactNode, useRef } from "react";
import { TextareaField } from "~/components/ui/Field";
import { AttachFiles } from "./AttachFiles.tsx";
import { asReference } from "./naming.ts";
import { Suggestions } from "./Suggestions.tsx";
import { useAttachments } from "./use-attachments.ts";
import { useSuggestions } from "./use-suggestions.ts";

export interface NoteTextProps {
  /** Public id of the project, whose people and things can be named. */
  projectId: string;
  field: Pick<FieldMetadata<string>, "id" | "name">;
  label: string;
  text: string;
  change: (text: string) => void;
  autoFocus?: boolean;
  errors?: string[];
  hint: ReactNode;
}

/** The field of a note: completes whom and what it names, takes files that are dropped or pasted into it. */
export function NoteText({ projectId, field, label, text, change, autoFocus, errors, hint }: NoteTextProps) {
  const naming = useSuggestions(projectId, text, change);
  const caret = useRef<number | null>(null);
  const insert = (words: string) => {
    const at = Math.min(caret.current ?? text.length, text.length);
    const [before, after] = [text.slice(0, at), text.slice(at)];
    const gap = before === "" || /\s$/.test(before) ? "" : " ";
    caret.current = at + gap.length + words.length + 1;
    change(`${before}${gap}${words} ${after}`);
  };
  const attachments = useAttachments(projectId, insert);
  const look = (element: HTMLTextAreaElement) => {
    caret.current = element.selectionStart;
    naming.look(element);
  };
  return (
    <>
      <TextareaField
        id={field.id}
        name={field.name}
        label={label}
        required
        rows={autoFocus ? 3 : 4}
        autoFocus={autoFocus}
        value={text}
        onChange={(event) => {
          change(event.currentTarget.value);
          look(event.currentTarget);
        }}
        onClick={(event) => look(event.currentTarget)}
        onKeyUp={(event) => {
          caret.current = event.currentTarget.selectionStart;
        }}
        onBlur={naming.close}
        onPaste={(event) => {
          const { files } = event.clipboardData;
          const reference = asReference(
            event.clipboardData.getData("text/plain"),
            location.origin,
            projectId,
          );
          if (files.length === 0 && !reference) return;
          event.preventDefault();
          caret.current = event.currentTarget.selectionStart;
          if (files.length > 0) attachments.take([...files]);
          else if (reference) insert(reference);
        }}
        onDragOver={(event) => {
          if (event.dataTransfer.types.includes("Files")) event.preventDefault();
        }}
        onDrop={(event) => {
          if (event.dataTransfer.files.length === 0) return;
          event.preventDefault();
          attachments.take([...event.dataTransfer.files]);
        }}
        {...naming.field}
        onKeyDown={(event) => {
          if (naming.take(event)) return;
          if (event.key === "Enter" && (event.ctrlKey || event.metaKey))
            event.currentTarget.form?.requestSubmit();
        }}
        errors={errors}
        hint={hint}
      />
      {naming.suggestions.length > 0 && (
        <Suggestions
          id={naming.id}
          suggestions={naming.suggestions}
          chosen={naming.chosen}
          onPick={naming.pick}
        />
      )}
      <div className="flex flex-wrap items-center gap-2">
        <AttachFiles {...attachments} />
      </div>
    </>
  );
}
