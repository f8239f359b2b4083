import { REFERENCE_HINTS, REFERENCE_WORDS } from "../words";

export type Kind = keyof typeof REFERENCE_WORDS;

export interface ReferenceFilesProps {
  kinds?: readonly Kind[];
  /** What is wrong with the files that were sent. */
  fault?: string | null;
}

/** A file for each reference sweep. Plain file fields: a file can be dropped on each, and a telephone offers its camera. */
export function ReferenceFiles({ kinds = ALL, fault }: ReferenceFilesProps) {
  return (
    <fieldset className="grid gap-3">
      <legend className="font-semibold mb-1">Reference sweeps</legend>
      <div className="grid gap-3 sm:grid-cols-2">
        {kinds.map((kind) => (
          <label key={kind} className="reference-drop">
            <span className="font-semibold">{REFERENCE_WORDS[kind]}</span>
            <span className="field-hint">{REFERENCE_HINTS[kind]}</span>
            <input type="file" name={kind} />
          </label>
        ))}
      </div>
      {fault && (
        <p role="alert" className="field-error">
          {fault}
        </p>
      )}
      <p className="field-hint">
        Text, Touchstone or pictures of a screen, each over the range that you sweep antennas in, taken with
        the same settings. Those that are missing can be added later.
      </p>
    </fieldset>
  );
}

const ALL = ["open", "short", "load", "through"] as const;
