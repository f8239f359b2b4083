import { describe, expect, it } from "vitest";
import { z } from "zod";
import { isOfOurs, parseForm } from "~/services/parse-form";

const formOf = (fields: [string, string][]) => {
  const form = new FormData();
  for (const [name, value] of fields) form.append(name, value);
  return form;
};

describe("parseForm", () => {
  it("reads lists and fields by their schema", () => {
    const schema = z.object({ title: z.string(), parts: z.array(z.object({ name: z.string() })) });
    const form = formOf([
      ["title", "Reeds"],
      ["parts[0].name", "a"],
      ["parts[1].name", "b"],
    ]);
    expect(parseForm(form, { schema })).toMatchObject({
      status: "success",
      value: { title: "Reeds", parts: [{ name: "a" }, { name: "b" }] },
    });
  });

  it.each([
    [[["title[30000000]", "x"]]],
    [[["title[4294967294]", "x"]]],
    [[["parts[1000].name", "x"]]],
    [[["parts[1e9].name", "x"]]],
    [[["__intent__", '{"type":"update","payload":{"name":"title[30000000]","value":"x"}}']]],
    [[["a.".repeat(200), "x"]]],
    [Array.from({ length: 5001 }, (_, i): [string, string] => [`a${i}`, ""])],
  ] as [string, string][][][])("refuses at once a form that would keep it busy, case %#", (fields) => {
    const form = formOf(fields);
    expect(isOfOurs(form)).toBe(false);
    expect(() => parseForm(form, { schema: z.object({ title: z.string() }) })).toThrow();
  });
});
