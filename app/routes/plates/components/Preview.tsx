import type { PlatePreview } from "../preview-plate.server";
import { RecordTables } from "./RecordTables";

interface PreviewProps {
  preview: PlatePreview | null;
  problem: string | null;
  busy: boolean;
}

/** The plate as it would be frozen now. */
export function Preview({ preview, problem, busy }: PreviewProps) {
  return (
    <section
      aria-labelledby="preview"
      className="plate-preview grid gap-3 min-w-0"
      aria-busy={busy || undefined}
    >
      <h3 id="preview">As it would be frozen</h3>
      {problem && (
        <p role="alert" className="panel border-l-3 border-l-alarm">
          {problem}
        </p>
      )}
      {preview ? (
        <>
          {/* biome-ignore lint/security/noDangerouslySetInnerHtml: the server drew it, and wrote every text in it as text */}
          <div className="plate-figure" dangerouslySetInnerHTML={{ __html: preview.svg }} />
          <details>
            <summary>Its numbers</summary>
            <div className="pt-3">
              <RecordTables tables={preview.tables} />
            </div>
          </details>
        </>
      ) : (
        !problem && <p className="soft">Put right what is marked, and it is shown here.</p>
      )}
    </section>
  );
}
