import { describe, expect, it } from "vitest";
import { conflictOf, mergeEdit, parseWas } from "../../app/services/merge-edit.ts";

const was = { title: "A", summary: "one", region: null as number | null };

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

describe("conflictOf", () => {
  it("asks about what both changed, and settles the rest for both", () => {
    const now = { ...was, title: "B", summary: "two" };
    const wanted = { ...was, title: "C", region: 1 };
    expect(conflictOf(now, wanted, mergeEdit(was, now, wanted))).toEqual({
      asked: [{ name: "title", mine: "C", theirs: "B" }],
      rest: { summary: "two", region: "1" },
      was: JSON.stringify(now),
    });
  });

  it("leads, whatever is chosen, to a form that is taken without another question", () => {
    const now = { ...was, title: "B" };
    const wanted = { ...was, title: "C" };
    const { asked, rest, was: began } = conflictOf(now, wanted, mergeEdit(was, now, wanted));
    for (const title of [asked[0].mine, asked[0].theirs]) {
      const sent = { ...now, title, summary: rest.summary };
      expect(mergeEdit(parseWas<typeof now>(began), now, sent).conflicts).toEqual([]);
    }
  });
});

describe("parseWas", () => {
  it("takes an object and nothing else", () => {
    expect(parseWas('{"title":"A"}')).toEqual({ title: "A" });
    for (const text of [undefined, "", "null", "1", "{"]) expect(parseWas(text)).toEqual({});
  });
});
