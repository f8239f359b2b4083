import { signsOf } from "./font-signs.ts";
import { loadFonts } from "./fonts.server.ts";

/** Whether our own fonts have a sign. */
export type Covered = (code: number) => boolean;

/** The family that has Greek, Cyrillic and the signs of mathematics. */
export const REST = "Roboto";

/** Of the plainest face, which has what the others have. Line ends are nobody's signs. */
export async function loadCoverage(): Promise<Covered> {
  const sans = (await loadFonts()).find(({ name }) => name === "sans");
  if (!sans) throw new Error("The font of texts is missing.");
  coverage ??= new Set([...signsOf(sans.bytes), 9, 10, 13]);
  const known = coverage;
  return (code) => known.has(code);
}

let coverage: Set<number> | undefined;

/** Stretches of a text by whether our own fonts have its signs. */
export function runsOf(text: string, covered: Covered): { text: string; rest: boolean }[] {
  const runs: { text: string; rest: boolean }[] = [];
  for (const sign of text) {
    const rest = !covered(sign.codePointAt(0) ?? 0);
    const last = runs.at(-1);
    if (last?.rest === rest) last.text += sign;
    else runs.push({ text: sign, rest });
  }
  return runs;
}

/** A drawing whose signs that our fonts lack are set in the one that has them: else a whole line may change its look. */
export function completeSvg(svg: string, covered: Covered): string {
  return svg.replace(/(<text\b[^>]*>)([^<]+)</g, (all, tag: string, escaped: string) => {
    const runs = runsOf(escaped, covered);
    if (runs.every(({ rest }) => !rest)) return all;
    const spans = runs.map(({ text, rest }) =>
      rest ? `<tspan font-family="${REST}">${text}</tspan>` : `<tspan>${text}</tspan>`,
    );
    return `${tag}${spans.join("")}<`;
  });
}
