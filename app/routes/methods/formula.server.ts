import katex from "katex";

/** TeX → MathML, which browsers draw and read out by themselves. Throws on TeX that is wrong: the definitions are our own. */
export function renderFormula(tex: string): string {
  const known = drawn.get(tex);
  if (known) return known;
  const markup = katex.renderToString(tex, {
    output: "mathml",
    displayMode: true,
    throwOnError: true,
    strict: "error",
  });
  drawn.set(tex, markup);
  return markup;
}

/** The formulas never change while the server runs. */
const drawn = new Map<string, string>();
