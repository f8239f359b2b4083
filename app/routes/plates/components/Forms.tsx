import type { PlatePageData } from "../plate-page.server";

/** Everything the plate can be had as, each at an address that stays. */
export function Forms({ plate }: { plate: PlatePageData }) {
  const { base, hasTouchstone } = plate;
  return (
    <section aria-labelledby="forms" className="grid gap-3 content-start">
      <h2 id="forms">Take it along</h2>
      <dl className="plate-forms">
        <dt>Figure</dt>
        <dd>
          <a href={`${base}.svg`}>SVG</a>, <a href={`${base}.svg?theme=dark`}>dark</a>
        </dd>
        <dt>Picture</dt>
        <dd>
          {[640, 1280, 2560].map((width, i) => (
            <span key={width}>
              {i > 0 && ", "}
              <a href={`${base}.png?width=${width}`}>PNG {width} px</a>
            </span>
          ))}
          , dark: <a href={`${base}.png?width=1280&theme=dark`}>1280 px</a>
        </dd>
        <dt>Page</dt>
        <dd>
          <a href={`${base}.pdf`}>PDF, A4</a>
        </dd>
        <dt>Numbers</dt>
        <dd>
          <a href={`${base}.csv`}>CSV</a>, <a href={`${base}.json`}>JSON</a>
          {hasTouchstone && (
            <>
              , <a href={`${base}.s1p`}>Touchstone</a>
            </>
          )}
        </dd>
        <dt>Reference</dt>
        <dd>
          <a href={`${base}.bib`}>BibTeX</a>, <a href={`${base}.csl.json`}>CSL-JSON</a>
        </dd>
        <dt>For another site</dt>
        <dd>
          <a href={`${base}/embed`}>The figure alone</a>
        </dd>
      </dl>
    </section>
  );
}
