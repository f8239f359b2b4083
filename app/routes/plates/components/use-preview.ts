import { useCallback, useEffect, useRef } from "react";
import { useFetcher } from "react-router";
import type { PreviewAnswer } from "../preview-plate.server";

/** Draws the plate as its form stands a moment after the last change; the newest answer counts. */
export function usePreview(action: string) {
  const fetcher = useFetcher<PreviewAnswer>();
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const { submit } = fetcher;
  useEffect(() => () => clearTimeout(timer.current), []);
  const onChange = useCallback(
    (form: HTMLFormElement) => {
      clearTimeout(timer.current);
      timer.current = setTimeout(() => submit(new FormData(form), { method: "post", action }), SETTLE_MS);
    },
    [submit, action],
  );
  return { answer: fetcher.data ?? null, busy: fetcher.state !== "idle", onChange };
}

/** A pause in typing; shorter asks for every letter. */
const SETTLE_MS = 350;
