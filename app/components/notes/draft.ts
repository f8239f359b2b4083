import { useEffect, useRef, useState } from "react";

/**
 * A text that survives a closed page: kept on this device under `key` while it differs from `stored`, until it is
 * forgotten. Where the device keeps nothing, it is a plain text.
 */
export function useDraft(key: string, stored: string) {
  const [text, setText] = useState(stored);
  const [restored, setRestored] = useState(false);
  const first = useRef(stored);
  useEffect(() => {
    const kept = readDraft(key);
    setText(kept ?? first.current);
    setRestored(kept !== null);
  }, [key]);
  return {
    text,
    /** The text is one that was begun earlier. */
    restored,
    change(next: string) {
      setText(next);
      setRestored(false);
      writeDraft(key, next === stored ? null : next);
    },
    forget(next: string) {
      setText(next);
      setRestored(false);
      writeDraft(key, null);
    },
  };
}

/** A key of one's own for one sending; empty until scripts run. A new one after each that was stored. `waiting`: that of a sending begun earlier. */
export function useClientKey(waiting: string | null) {
  const [key, setKey] = useState("");
  useEffect(() => setKey((before) => waiting ?? (before || newKey())), [waiting]);
  return [key, () => setKey(newKey())] as const;
}

function newKey(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(16)), (byte) =>
    byte.toString(16).padStart(2, "0"),
  ).join("");
}

export function readDraft(key: string): string | null {
  try {
    return localStorage.getItem(PREFIX + key);
  } catch {
    return null;
  }
}

export function writeDraft(key: string, text: string | null): void {
  try {
    if (text === null || text === "") localStorage.removeItem(PREFIX + key);
    else localStorage.setItem(PREFIX + key, text);
  } catch {
    // Full or forbidden: the text stays in the field.
  }
}

const PREFIX = "swale:draft:";
