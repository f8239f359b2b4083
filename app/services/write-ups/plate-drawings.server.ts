import { readForm } from "../plates/forms.server.ts";

export type DrawingOf = (
  publicId: string,
  theme: "light" | "dark",
  width: "wide" | "narrow",
) => string | null;

/** The frozen drawings of plates as SVG text, for what holds them itself. A plate without one is missing. */
export async function loadDrawings(publicIds: readonly string[]): Promise<DrawingOf> {
  const wanted = publicIds.flatMap((id) => FORMS.map((form) => ({ id, form })));
  const found = await Promise.all(wanted.map(({ id, form }) => readForm(id, form)));
  const drawings = new Map(
    found.flatMap((form, i) => {
      if (form === undefined || form === "withdrawn") return [];
      return [[`${wanted[i].id} ${wanted[i].form}`, form.bytes.toString("utf8")] as const];
    }),
  );
  return (publicId, theme, width) =>
    drawings.get(`${publicId} svg-${theme}${width === "narrow" ? "-narrow" : ""}`) ?? null;
}

const FORMS = ["svg-light", "svg-light-narrow", "svg-dark", "svg-dark-narrow"] as const;
