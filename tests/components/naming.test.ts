import { describe, expect, it } from "vitest";
import { asReference, completed, namingAt } from "../../app/components/notes/naming.ts";

describe("namingAt", () => {
  it.each([
    ["@", "people", ""],
    ["see @ad", "people", "ad"],
    ["(@ad", "people", "ad"],
    ["at #7.0", "things", "7.0"],
    ["one\n#before", "things", "before"],
  ])("finds in %j that %s are named", (text, of, q) => {
    expect(namingAt(text, text.length)).toEqual({ of, q, from: text.length - q.length - 1 });
  });

  it.each(["", "ada", "ada@fennmarsh", "@ada ", "# heading", "a#b", `@${"x".repeat(41)}`])(
    "finds nothing in %j",
    (text) => {
      expect(namingAt(text, text.length)).toBeNull();
    },
  );

  it("looks at what stands before the caret alone", () => {
    expect(namingAt("@ada and more", 3)).toEqual({ of: "people", q: "ad", from: 0 });
  });
});

describe("completed", () => {
  it("puts what was picked in the place of what was typed, with a space after it", () => {
    const naming = { of: "people" as const, q: "ad", from: 4 };
    expect(completed("see @ad", naming, "@ada-marsh")).toEqual(["see @ada-marsh ", 15]);
    expect(completed("see @ad now", naming, "@ada-marsh")).toEqual(["see @ada-marsh now", 15]);
  });
});

describe("asReference", () => {
  const HERE = "https://swale.example";
  it.each([
    [`${HERE}/projects/p1/dips/d1`, "#dip:d1"],
    [` ${HERE}/projects/p1/sweeps/s1?dip=d2#note-3 `, "#sweep:s1"],
    [`${HERE}/projects/p1/steps/t1/`, "#step:t1"],
    [`${HERE}/plates/q1`, "#plate:q1"],
    [`${HERE}/projects/p2/dips/d1`, null],
    ["https://fennmarsh.example/projects/p1/dips/d1", null],
    [`${HERE}/projects/p1/dips/d1/edit`, null],
    [`look: ${HERE}/projects/p1/dips/d1`, null],
    ["text", null],
  ])("reads %s as %s", (pasted, reference) => {
    expect(asReference(pasted, HERE, "p1")).toBe(reference);
  });
});
