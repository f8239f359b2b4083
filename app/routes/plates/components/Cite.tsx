import type { PlatePageData } from "../plate-page.server";
import { CopyText } from "./CopyText";

/** A sentence to cite, and what to paste where. */
export function Cite({ plate }: { plate: PlatePageData }) {
  const { sentence, texts } = plate.cite;
  return (
    <section aria-labelledby="cite" className="grid gap-3 content-start min-w-0">
      <h2 id="cite">Cite it</h2>
      <CopyText label="A sentence" text={sentence} />
      <details>
        <summary>For Markdown, HTML, LaTeX or plain text</summary>
        <div className="grid gap-3 pt-3">
          <CopyText label="Markdown" text={texts.markdown} />
          <CopyText label="HTML, with the figure" text={texts.html} />
          <CopyText label="LaTeX" text={texts.latex} />
          <CopyText label="Plain text" text={texts.plain} />
        </div>
      </details>
    </section>
  );
}
