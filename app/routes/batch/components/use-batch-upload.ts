import { useEffect, useState } from "react";
import { useNavigate } from "react-router";

export type UploadState =
  | { kind: "idle" }
  | { kind: "sending"; share: number; files: number }
  | { kind: "checking" }
  | { kind: "failed"; message: string };

/** Sends a batch in pieces of bounded size, one after another; sending again goes on, as what arrived is known by its name and bytes. */
export function useBatchUpload(base: string, batch: string) {
  const [state, setState] = useState<UploadState>({ kind: "idle" });
  const navigate = useNavigate();

  // Leaving the page in the middle of sending asks first.
  const busy = state.kind === "sending";
  useEffect(() => {
    if (!busy) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener("beforeunload", ask);
    return () => window.removeEventListener("beforeunload", ask);
  }, [busy]);

  const send = async (files: File[], table: File | null) => {
    const pieces = piecesOf(inOrder(files));
    const all = files.reduce((sum, { size }) => sum + size, 1);
    let before = 0;
    for (const [i, piece] of pieces.entries()) {
      const last = i === pieces.length - 1;
      const form = new FormData();
      form.set("batch", batch);
      for (const file of piece) form.append("files", file, file.webkitRelativePath || file.name);
      if (last) form.set("last", "yes");
      if (last && table) form.set("table", table, table.name);
      const size = piece.reduce((sum, file) => sum + file.size, 0);
      const sent = (bytes: number) =>
        setState(
          bytes >= size && last
            ? { kind: "checking" }
            : {
                kind: "sending",
                share: Math.min(1, (before + Math.min(bytes, size)) / all),
                files: files.length,
              },
        );
      sent(0);
      const status = await post(`${base}/batch/upload`, form, sent);
      if (status !== 200) return setState({ kind: "failed", message: wordsFor(status) });
      before += size;
    }
    await navigate(`${base}/batch/${batch}`);
  };
  return { state, send };
}

/** The answer's status; 0 where none came. */
function post(address: string, form: FormData, sent: (bytes: number) => void): Promise<number> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open("POST", address);
    request.upload.onprogress = ({ loaded }) => sent(loaded);
    request.onload = () => resolve(request.status);
    request.onerror = () => resolve(0);
    request.send(form);
  });
}

/** By path, numbers as numbers: a folder has no order of its own. */
function inOrder(files: File[]): File[] {
  const pathOf = (file: File) => file.webkitRelativePath || file.name;
  return [...files].sort((a, b) => pathOf(a).localeCompare(pathOf(b), "en", { numeric: true }));
}

function piecesOf(files: File[]): File[][] {
  const pieces: File[][] = [[]];
  let bytes = 0;
  for (const file of files) {
    const piece = pieces[pieces.length - 1];
    if (piece.length > 0 && (bytes + file.size > MOST_BYTES || piece.length >= MOST_FILES)) {
      pieces.push([file]);
      bytes = file.size;
    } else {
      piece.push(file);
      bytes += file.size;
    }
  }
  return pieces;
}

function wordsFor(status: number): string {
  if (status === 0)
    return "The connection was lost. No sweep was made; send it again, and it goes on from there.";
  if (status === 413)
    return "One of the files is larger than 130 MB. No sweep was made; leave it out or split it.";
  if (status === 401 || status === 403 || status === 404)
    return "You are signed out, or may not add sweeps here. No sweep was made; sign in and send it again.";
  if (status === 409)
    return "This batch was taken in already. Nothing of this was stored; load the page anew to begin another.";
  if (status === 429)
    return "Too much was sent in a short time. No sweep was made; wait a minute and send it again.";
  return "The server did not take it. No sweep was made; send it again.";
}

/** A request takes 140 MB. */
const MOST_BYTES = 60 * 1024 * 1024;
const MOST_FILES = 50;
