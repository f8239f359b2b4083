import { describe, expect, it } from "vitest";
import routes from "~/routes";
import { openApiDocument } from "~/routes/api/openapi-document";
import { ENDINGS, formOf, MEDIA_TYPES, NEGOTIATED, PNG_WIDTHS } from "~/services/plates/form-names";

const { paths } = openApiDocument("https://swale.example");

interface Said {
  parameters?: { name: string; schema: { enum?: unknown[] } }[];
  responses: Record<string, { content?: object }>;
}
const getOf = (path: string) => paths[path]?.get as Said | undefined;

describe("the OpenAPI document of the forms", () => {
  it("has every form that a plate is served in, with its type", () => {
    for (const ending of ENDINGS) {
      const path = `/plates/{plate}${ending.startsWith("/") ? "" : "."}${ending}`;
      const said = getOf(path);
      const form = formOf(ending, new URLSearchParams()) ?? "";
      const type = MEDIA_TYPES[form.split("-")[0] ?? ""]?.split(";")[0];
      expect([path, Object.keys(said?.responses["200"]?.content ?? {})]).toEqual([path, [type]]);
      for (const status of ["304", "404", "410"]) expect(said?.responses).toHaveProperty(status);
    }
  });

  it("has every size and theme, and no other", () => {
    for (const ending of ["svg", "png"] as const) {
      const asked = Object.fromEntries(
        (getOf(`/plates/{plate}.${ending}`)?.parameters ?? []).map(({ name, schema }) => [name, schema.enum]),
      );
      for (const [name, values = []] of Object.entries(asked)) {
        for (const value of values)
          expect(formOf(ending, new URLSearchParams({ [name]: String(value) }))).not.toBeNull();
      }
      expect(asked.theme).toEqual(["light", "dark"]);
    }
    const width = getOf("/plates/{plate}.png")?.parameters?.find(({ name }) => name === "width");
    expect(width?.schema.enum).toEqual([...PNG_WIDTHS]);
  });

  it("says what the plain address gives", () => {
    expect(Object.keys(getOf("/plates/{plate}")?.responses["200"]?.content ?? {})).toEqual([
      "text/html",
      ...NEGOTIATED.keys(),
    ]);
  });

  it("has every address of plates and write-ups outside of projects that the site map has", () => {
    const known = routes
      .flatMap(({ path }) => path ?? [])
      .filter((path) => /^(?:plates|write-ups)\//.test(path));
    expect(known.length).toBeGreaterThan(3);
    for (const path of known) expect(paths).toHaveProperty([`/${path.replace(/:(\w+)/g, "{$1}")}`]);
  });
});
