import { type KeyboardEvent, useEffect, useId, useState } from "react";
import { useFetcher } from "react-router";
import { completed, type Naming, namingAt } from "./naming.ts";
import type { Suggestion } from "./Suggestions.tsx";

/** Completes whom and what a note names while it is typed. `change` is given the completed text. */
export function useSuggestions(projectId: string, text: string, change: (text: string) => void) {
  const id = useId();
  const fetcher = useFetcher<{ q: string; suggestions: Suggestion[] }>();
  const [naming, setNaming] = useState<Naming | null>(null);
  const [chosen, setChosen] = useState(0);
  const [field, setField] = useState<HTMLTextAreaElement | null>(null);
  const [caret, setCaret] = useState<number | null>(null);
  const { load } = fetcher;
  const [of, q] = [naming?.of, naming?.q ?? ""];
  useEffect(() => {
    setChosen(0);
    if (!of) return;
    const timer = setTimeout(
      () => load(`/projects/${projectId}/notes/suggest?of=${of}&q=${encodeURIComponent(q)}`),
      TYPING_MS,
    );
    return () => clearTimeout(timer);
  }, [of, q, projectId, load]);
  useEffect(() => {
    if (caret === null || !field) return;
    field.setSelectionRange(caret, caret);
    setCaret(null);
  }, [caret, field]);
  const suggestions = naming && fetcher.data?.q === naming.q.trim() ? fetcher.data.suggestions : [];
  const open = suggestions.length > 0;
  const pick = (suggestion: Suggestion) => {
    if (!naming) return;
    const [next, at] = completed(text, naming, suggestion.insert);
    change(next);
    setCaret(at);
    setNaming(null);
  };
  return {
    id,
    suggestions,
    chosen,
    pick,
    /** After each change and move of the caret. */
    look: (element: HTMLTextAreaElement) => {
      setField(element);
      setNaming(namingAt(element.value, element.selectionStart));
    },
    close: () => setNaming(null),
    /** True where the key was for the list. */
    take: (event: KeyboardEvent<HTMLTextAreaElement>): boolean => {
      if (!open) return false;
      const step = STEPS[event.key];
      if (step) setChosen((chosen + step + suggestions.length) % suggestions.length);
      else if (event.key === "Enter" || event.key === "Tab") pick(suggestions[chosen]);
      else if (event.key === "Escape") setNaming(null);
      else return false;
      event.preventDefault();
      return true;
    },
    field: {
      "aria-autocomplete": "list" as const,
      "aria-controls": open ? id : undefined,
      "aria-activedescendant": open ? `${id}-${chosen}` : undefined,
    },
  };
}

const STEPS: Record<string, number> = { ArrowDown: 1, ArrowUp: -1 };
/** A pause in typing; shorter asks for every letter. */
const TYPING_MS = 150;
