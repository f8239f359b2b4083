import { useEffect, useReducer, useRef } from "react";
import { useFetcher } from "react-router";
import type { PictureFields } from "../../picture.schema";
import type { TryAnswer } from "../../reading-try";

interface History {
  past: PictureFields[];
  now: PictureFields;
  /** What the last change was about: changes of one thing in a row are undone at once. */
  about: string | null;
}

type Change = { type: "set"; fields: Partial<PictureFields>; about: string } | { type: "undo" };

/** The choices as they are being made, with undo, and what they would give a moment after the last one. */
export function usePictureFields(first: PictureFields, action: string) {
  const [history, change] = useReducer(reduce, { past: [], now: first, about: null });
  const fetcher = useFetcher<TryAnswer>();
  const { submit } = fetcher;
  const { now } = history;
  const tried = useRef(first);
  useEffect(() => {
    if (tried.current === now) return;
    const timer = setTimeout(() => {
      tried.current = now;
      submit(formOf(now), { method: "post", action });
    }, SETTLE_MS);
    return () => clearTimeout(timer);
  }, [now, submit, action]);

  const { data } = fetcher;
  useEffect(() => {
    if (data?.fields) change({ type: "set", fields: data.fields, about: "print" });
  }, [data]);

  return {
    fields: now,
    tried: data?.tried ?? null,
    errors: data?.errors ?? {},
    busy: fetcher.state !== "idle",
    set: (fields: Partial<PictureFields>, about: string) => change({ type: "set", fields, about }),
    undo: history.past.length > 0 ? () => change({ type: "undo" }) : null,
    print: () => {
      const form = formOf(now);
      form.set("intent", "print");
      submit(form, { method: "post", action });
    },
  };
}

function reduce(history: History, change: Change): History {
  const { past, now, about } = history;
  if (change.type === "undo") {
    const before = past[past.length - 1];
    return before ? { past: past.slice(0, -1), now: before, about: null } : history;
  }
  const merged = change.about === about && past.length > 0;
  return {
    past: merged ? past : [...past.slice(-MOST_STEPS), now],
    now: { ...now, ...change.fields },
    about: change.about,
  };
}

function formOf(fields: PictureFields): FormData {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.set(name, value);
  return form;
}

const SETTLE_MS = 80;
const MOST_STEPS = 200;
