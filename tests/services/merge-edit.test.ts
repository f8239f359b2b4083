import { describe, expect, it } from "vitest";
import { mergeEdit, parseWas } from "../../app/services/merge-edit.ts";

const was = { title: "A", summary: "one", region: null };

describe("mergeEdit", () => {
  it("writes only what this person changed, so that another's change stays", () => {
    const now = { ...was, title: "B" };
    expect(mergeEdit(was, now, { ...was, summary: "two" })).toEqual({
      changes: { summary: "two" },
      conflicts: [],
    });
  });

  it("asks where both changed the same field to different things", () => {
    const now = { ...was, title: "B" };
    expect(mergeEdit(was, now, { ...was, title: "C" })).toEqual({ changes: {}, conflicts: ["title"] });
    expect(mergeEdit(was, now, { ...was, title: "B" })).toEqual({ changes: {}, conflicts: [] });
  });

  it("takes a form that does not say how it began as wholly changed", () => {
    expect(mergeEdit({}, was, { ...was, title: "C" }).changes).toEqual({ title: "C" });
  });
});

describe("parseWas", () => {
  it("takes an object and nothing else", () => {
    expect(parseWas('{"title":"A"}')).toEqual({ title: "A" });
    for (const text of [undefined, "", "null", "1", "{"]) expect(parseWas(text)).toEqual({});
  });
});
