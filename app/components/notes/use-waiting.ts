import { type RefObject, useCallback, useEffect, useState } from "react";
import { readDraft, writeDraft } from "./draft.ts";

/**
 * A form that could not be sent for want of a connection, sent again by itself: when there is one, and every few seconds.
 * Its sending key is kept on this device, so that a reload goes on with the same and the server stores it once.
 */
export function useWaiting(draftKey: string, form: RefObject<HTMLFormElement | null>, busy: boolean) {
  const key = `${draftKey}:sending`;
  const [clientKey, setClientKey] = useState<string | null>(null);
  useEffect(() => setClientKey(readDraft(key)), [key]);
  useEffect(() => {
    if (clientKey === null || busy) return;
    const again = () => {
      if (navigator.onLine) form.current?.requestSubmit();
    };
    const timer = setInterval(again, AGAIN_MS);
    window.addEventListener("online", again);
    return () => {
      clearInterval(timer);
      window.removeEventListener("online", again);
    };
  }, [clientKey, busy, form]);
  const set = useCallback(
    (next: string | null) => {
      setClientKey(next);
      writeDraft(key, next);
    },
    [key],
  );
  return {
    /** The key that it waits with; null while nothing waits. */
    clientKey,
    wait: set,
    stop: useCallback(() => set(null), [set]),
  };
}

const AGAIN_MS = 10_000;
