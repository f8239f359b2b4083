import { useRef, useState } from "react";

/** A file on its way into a note. */
export interface OnItsWay {
  key: number;
  name: string;
  state: "sending" | "refused";
  message?: string;
}

/** Sends files for a note, one after another; each that arrives is named in the text by `insert`. */
export function useAttachments(projectId: string, insert: (markdown: string) => void) {
  const [files, setFiles] = useState<OnItsWay[]>([]);
  const count = useRef(0);
  const queue = useRef<Promise<void>>(Promise.resolve());
  const latestInsert = useRef(insert);
  latestInsert.current = insert;
  const drop = (key: number) => setFiles((before) => before.filter((file) => file.key !== key));
  const send = async (file: File, key: number) => {
    const problem = await sendFile(projectId, file, (markdown) => latestInsert.current(markdown));
    if (problem === null) drop(key);
    else {
      setFiles((before) =>
        before.map((one) => (one.key === key ? { ...one, state: "refused", message: problem } : one)),
      );
    }
  };
  return {
    files,
    drop,
    take(list: Iterable<File>) {
      for (const file of list) {
        count.current += 1;
        const key = count.current;
        setFiles((before) => [...before, { key, name: file.name, state: "sending" }]);
        queue.current = queue.current.then(() => send(file, key));
      }
    },
  };
}

/** Null when the file arrived, else what to tell the person. */
async function sendFile(
  projectId: string,
  file: File,
  insert: (markdown: string) => void,
): Promise<string | null> {
  const form = new FormData();
  form.set("file", file);
  try {
    const answer = await fetch(`/projects/${projectId}/attachments`, { method: "POST", body: form });
    const said = (await answer.json().catch(() => ({}))) as { markdown?: string; message?: string };
    if (answer.ok && said.markdown) {
      insert(said.markdown);
      return null;
    }
    if (answer.status === 413) return "It is too large.";
    if (answer.status === 404 || answer.status === 403) return "You are signed out, or may not write here.";
    return said.message ?? "The server did not take it. Try again in a minute.";
  } catch {
    return "The server could not be reached. Give it again when there is a connection.";
  }
}
