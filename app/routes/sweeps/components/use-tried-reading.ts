import { useCallback, useEffect, useRef } from "react";
import { useFetcher } from "react-router";
import type { TryAnswer } from "../reading-try";

/** Reads the file as the form stands a moment after the last change; the newest answer counts, until the reading is kept. */
export function useTriedReading(action: string, reading: number | null) {
  const fetcher = useFetcher<TryAnswer>({ key: `${action} ${reading}` });
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const { submit } = fetcher;
  useEffect(() => () => clearTimeout(timer.current), []);
  const onChange = useCallback(
    (form: HTMLFormElement) => {
      clearTimeout(timer.current);
      timer.current = setTimeout(() => {
        submit(new FormData(form), { method: "post", action });
      }, SETTLE_MS);
    },
    [submit, action],
  );
  return {
    tried: fetcher.data?.tried ?? null,
    errors: fetcher.data?.errors ?? {},
    busy: fetcher.state !== "idle",
    onChange,
  };
}

const SETTLE_MS = 150;
