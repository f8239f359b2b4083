import { useEffect, useRef, useState } from "react";
import type { Heading } from "~/services/markdown-article";

export interface Looked {
  /** What it was drawn from. */
  text: string;
  html: string;
  headings: Heading[];
}

/**
 * How the text looks, drawn by the server after a pause in typing. The last drawing stays until the next is there; where no
 * answer comes, writing goes on and `missed` says so.
 */
export function useLook(projectId: string, text: string, first: Looked) {
  const [article, setArticle] = useState(first);
  const [state, setState] = useState<"there" | "asked" | "missed">("there");
  const asked = useRef(first.text);
  useEffect(() => {
    if (text === asked.current) return;
    const given = new AbortController();
    const timer = setTimeout(async () => {
      setState("asked");
      const answer = await look(projectId, text, given.signal);
      if (given.signal.aborted) return;
      if (answer) {
        asked.current = text;
        setArticle(answer);
      }
      setState(answer ? "there" : "missed");
    }, TYPING_MS);
    return () => {
      clearTimeout(timer);
      given.abort();
    };
  }, [text, projectId]);
  return { article, busy: state === "asked", missed: state === "missed" };
}

async function look(projectId: string, text: string, signal: AbortSignal): Promise<Looked | null> {
  try {
    const answer = await fetch(`/projects/${projectId}/write-ups/preview`, {
      method: "POST",
      body: new URLSearchParams({ body: text }),
      signal,
    });
    return answer.ok ? ((await answer.json()) as Looked) : null;
  } catch {
    return null;
  }
}

/** A pause in typing; shorter draws a page for every word. */
const TYPING_MS = 600;
