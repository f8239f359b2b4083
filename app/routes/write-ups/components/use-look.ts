import { useEffect, useRef } from "react";
import { useFetcher } from "react-router";
import type { Heading } from "~/services/markdown-article";

export interface Looked {
  /** What it was drawn from. */
  text: string;
  html: string;
  headings: Heading[];
}

/** How the text looks, drawn by the server after a pause in typing. The last drawing stays until the next is there. */
export function useLook(projectId: string, text: string, first: Looked): { article: Looked; busy: boolean } {
  const fetcher = useFetcher<Looked>();
  const article = fetcher.data ?? first;
  const asked = useRef(first.text);
  const { submit } = fetcher;
  useEffect(() => {
    if (text === asked.current) return;
    const timer = setTimeout(() => {
      asked.current = text;
      submit({ body: text }, { method: "post", action: `/projects/${projectId}/write-ups/preview` });
    }, TYPING_MS);
    return () => clearTimeout(timer);
  }, [text, projectId, submit]);
  return { article, busy: fetcher.state !== "idle" };
}

/** A pause in typing; shorter draws a page for every word. */
const TYPING_MS = 600;
