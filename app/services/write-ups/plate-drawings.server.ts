import { readForm } from "../plates/forms.server.ts";

export type DrawingOf = (publicId: string, theme: "light" | "dark") => string | null;

/** The frozen drawings of plates as SVG text, for what holds them itself. A plate without one is missing. */
export async function loadDrawings(publicIds: readonly string[]): Promise<DrawingOf> {
  const wanted = publicIds.flatMap((id) => (["light", "dark"] as const).map((theme) => ({ id, theme })));
  const found = await Promise.all(wanted.map(({ id, theme }) => readForm(id, `svg-${theme}`)));
  const drawings = new Map(
    found.flatMap((form, i) => {
      if (form === undefined || form === "withdrawn") return [];
      return [[`${wanted[i].id} ${wanted[i].theme}`, form.bytes.toString("utf8")] as const];
    }),
  );
  return (publicId, theme) => drawings.get(`${publicId} ${theme}`) ?? null;
}
