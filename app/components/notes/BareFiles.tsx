/** Chooses files for a note where no script sends them ahead; they go along with its form. */
export function BareFiles() {
  return (
    <noscript>
      <label className="field-hint">
        Pictures and sweep files for this note: <input type="file" name="file" multiple className="control" />
      </label>
    </noscript>
  );
}
