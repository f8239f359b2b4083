import { useCallback, useEffect, useReducer, useRef } from "react";
import { type PictureStage, STAGES } from "~/services/seen-picture";
import type { UploadResult } from "../take-uploads.server";

interface Base {
  id: number;
  file: File;
  /** 0 to 1. */
  sent: number;
  /** Of a picture: what is done of its reading. */
  stage?: PictureStage;
}

export type Upload = Base &
  (
    | { state: "waiting" | "sending" | "reading" }
    | { state: "failed"; message: string }
    | { state: "done"; result: UploadResult }
  );

type Change =
  | { type: "add"; files: { id: number; file: File }[] }
  | { type: "remove"; id: number }
  | { type: "set"; id: number; upload: Partial<Base> & (Pick<Upload, "state"> & object) };

/** Sends files one request each with the same fields, two at a time, and says how far each one is. */
export function useUploads(action: string, fields: Record<string, string>) {
  const [uploads, change] = useReducer(reduce, []);
  const nextId = useRef(1);
  const running = useRef(new Map<number, XMLHttpRequest>());

  const start = useCallback(
    (upload: Upload) => {
      const set = (update: Record<string, unknown> & { state: Upload["state"] }) =>
        change({ type: "set", id: upload.id, upload: update });
      const request = new XMLHttpRequest();
      running.current.set(upload.id, request);
      request.open("POST", action);
      request.setRequestHeader("Accept", "application/x-ndjson, application/json");
      request.upload.onprogress = (event) => {
        if (event.lengthComputable) set({ state: "sending", sent: event.loaded / event.total });
      };
      request.upload.onload = () => set({ state: "reading", sent: 1 });
      request.onprogress = () => {
        const stage = eventsOf(request.responseText).findLast((event) => event.stage)?.stage;
        if (stage) set({ state: "reading", sent: 1, stage });
      };
      request.onerror = () => set({ state: "failed", message: LOST });
      request.onabort = () => change({ type: "remove", id: upload.id });
      request.onload = () => {
        const result = eventsOf(request.responseText).findLast((event) => event.results)?.results?.[0];
        if (result && result.kind !== "failed") set({ state: "done", result });
        else set({ state: "failed", message: result?.message ?? wordsFor(request.status) });
      };
      request.onloadend = () => running.current.delete(upload.id);
      const form = new FormData();
      form.set("files", upload.file);
      for (const [name, value] of Object.entries(fields)) form.set(name, value);
      set({ state: "sending", sent: 0 });
      request.send(form);
    },
    [action, fields],
  );

  useEffect(() => {
    const free = AT_ONCE - running.current.size;
    const waiting = uploads.filter((upload) => upload.state === "waiting" && !running.current.has(upload.id));
    for (const upload of waiting.slice(0, Math.max(0, free))) start(upload);
  }, [uploads, start]);

  // Leaving the page in the middle of an upload asks first.
  const busy = uploads.some((upload) => ["waiting", "sending"].includes(upload.state));
  useEffect(() => {
    if (!busy) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener("beforeunload", ask);
    return () => window.removeEventListener("beforeunload", ask);
  }, [busy]);

  return {
    uploads,
    add: (files: File[]) =>
      change({ type: "add", files: files.map((file) => ({ id: nextId.current++, file })) }),
    retry: (id: number) =>
      change({ type: "set", id, upload: { state: "waiting", sent: 0, stage: undefined } }),
    cancel: (id: number) => {
      const request = running.current.get(id);
      if (request) request.abort();
      else change({ type: "remove", id });
    },
  };
}

function reduce(uploads: Upload[], change: Change): Upload[] {
  switch (change.type) {
    case "add":
      return [...uploads, ...change.files.map((file): Upload => ({ ...file, sent: 0, state: "waiting" }))];
    case "remove":
      return uploads.filter((upload) => upload.id !== change.id);
    case "set":
      return uploads.map((upload) =>
        upload.id === change.id ? ({ ...upload, ...change.upload } as Upload) : upload,
      );
  }
}

/** One event a line; a line that is not whole yet is left for later. */
function eventsOf(text: string): { stage?: PictureStage; results?: UploadResult[] }[] {
  return text.split("\n").flatMap((line) => {
    try {
      const event = JSON.parse(line);
      return event.stage && !STAGES.includes(event.stage) ? [] : [event];
    } catch {
      return [];
    }
  });
}

function wordsFor(status: number): string {
  if (status === 401 || status === 403 || status === 404)
    return "You are signed out, or may not add sweeps here. Nothing was stored; sign in and send it again.";
  if (status === 413)
    return "The file is larger than 64 MB. Nothing was stored; sweep with fewer points or split it.";
  if (status === 429)
    return "Too many files in a short time. Nothing was stored; wait a minute and send it again.";
  return "The server did not take the file. Nothing of it was kept; send it again.";
}

const LOST = "The connection was lost. Nothing of the file was kept; send it again when you are back.";
const AT_ONCE = 2;
