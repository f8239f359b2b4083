import { REFERENCE_WORDS } from "../words";

export interface ReferenceKindsProps {
  references: { kind: keyof typeof REFERENCE_WORDS; sweep: string; fileName: string }[];
}

/** Which reference is which, for files that were exchanged. */
export function ReferenceKinds({ references }: ReferenceKindsProps) {
  if (references.length < 1) return null;
  return (
    <fieldset className="grid gap-2">
      <legend className="font-semibold mb-1">Which reference is which</legend>
      {references.map(({ kind, sweep, fileName }) => (
        <label key={sweep} className="grid grid-cols-[8.5rem_minmax(0,1fr)] items-center gap-3">
          <select name={`kinds.${sweep}`} defaultValue={kind} className="control">
            {Object.entries(REFERENCE_WORDS).map(([value, label]) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </select>
          <span className="text-small break-all">{fileName}</span>
        </label>
      ))}
    </fieldset>
  );
}
