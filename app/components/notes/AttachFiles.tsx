import { useRef } from "react";
import { Button } from "~/components/ui/Button";
import type { OnItsWay } from "./use-attachments.ts";

/** Chooses pictures and sweep files for a note, and says of each how it goes. */
export function AttachFiles({
  files,
  take,
  drop,
}: {
  files: OnItsWay[];
  take: (files: Iterable<File>) => void;
  drop: (key: number) => void;
}) {
  const input = useRef<HTMLInputElement>(null);
  return (
    <>
      <input
        ref={input}
        type="file"
        multiple
        hidden
        aria-label="Pictures and sweep files"
        onChange={(event) => {
          take(event.currentTarget.files ?? []);
          event.currentTarget.value = "";
        }}
      />
      <Button
        type="button"
        variant="quiet"
        size="small"
        className="script-only"
        onClick={() => input.current?.click()}
      >
        Attach files
      </Button>
      {files.length > 0 && (
        <ul className="basis-full grid gap-1 text-small" aria-live="polite">
          {files.map(({ key, name, state, message }) => (
            <li key={key} className={state === "refused" ? "text-alarm" : "soft"}>
              {state === "sending" ? `“${name}” is being sent…` : `“${name}” was not taken. ${message}`}{" "}
              {state === "refused" && (
                <Button type="button" variant="quiet" size="small" onClick={() => drop(key)}>
                  Close
                </Button>
              )}
            </li>
          ))}
        </ul>
      )}
    </>
  );
}
