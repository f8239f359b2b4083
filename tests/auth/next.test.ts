import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { safePath } from "~/auth/next";

describe("safePath", () => {
  it.each(["/projects", "/projects/abc?sort=-frequency#dip", "/", "/a b"])(
    "keeps a path of this site: %s",
    (path) => {
      expect(new URL(safePath(path), "http://x").pathname).toBe(new URL(path, "http://x").pathname);
    },
  );

  it("keeps search and hash", () => {
    expect(safePath("/a?b=c#d")).toBe("/a?b=c#d");
  });

  it.each([
    "",
    "projects",
    "https://elsewhere.example/",
    "//elsewhere.example",
    "/\\elsewhere.example",
    "\\/elsewhere.example",
    "/\t/elsewhere.example",
    "/\n/elsewhere.example",
    "/.//elsewhere.example",
    "/x/..//elsewhere.example",
    "javascript:alert(1)",
    `/${"x".repeat(3000)}`,
    null,
    undefined,
    7,
  ])("gives the fallback for %j", (wish) => {
    expect(safePath(wish, "/home")).toBe("/home");
  });

  it("never leads to another origin, whatever is asked", () => {
    const pieces = fc.constantFrom(
      "/",
      "\\",
      ".",
      "..",
      "\t",
      "\n",
      "\r",
      "@",
      ":",
      "?",
      "#",
      "http:",
      "x.example",
      "%2f",
      " ",
    );
    fc.assert(
      fc.property(fc.array(pieces, { maxLength: 8 }), (parts) => {
        const path = safePath(parts.join(""));
        expect(new URL(path, "http://here.example/deep/page").origin).toBe("http://here.example");
      }),
      { numRuns: 2000 },
    );
  });
});
