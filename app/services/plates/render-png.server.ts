import { renderAsync } from "@resvg/resvg-js";
import { completeSvg, loadCoverage } from "../font-runs.server.ts";
import { DISPLAY_NAMES, loadFonts } from "../fonts.server.ts";

/** A drawing as a PNG of the given width, in a thread of its own; only our fonts, so that every machine draws the same. */
export async function renderPng(svg: string, widthPx: number): Promise<Buffer> {
  const [fonts, covered] = await Promise.all([loadFonts(), loadCoverage()]);
  const named = completeSvg(svg, covered).replaceAll(`"${DISPLAY_NAMES.drawn},`, `"${DISPLAY_NAMES.file},`);
  const image = await renderAsync(named, {
    fitTo: { mode: "width", value: widthPx },
    font: {
      loadSystemFonts: false,
      fontFiles: fonts.map((font) => font.path),
      defaultFontFamily: "Atkinson Hyperlegible Next",
      sansSerifFamily: "Atkinson Hyperlegible Next",
      monospaceFamily: "Sometype Mono",
    },
  });
  return image.asPng();
}
