import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { attachment, cleanFileName, plainText, titleFromFileName } from "../../app/services/file-names.ts";

describe("cleanFileName", () => {
  it("takes the last part of a path of either kind", () => {
    expect(cleanFileName("../../etc/a.csv")).toBe("a.csv");
    expect(cleanFileName("C:\\sweeps\\b.s1p")).toBe("b.s1p");
  });

  it("takes out control characters and marks that turn the writing", () => {
    expect(cleanFileName("\u202egpj.exe\u0000\n")).toBe("gpj.exe");
    expect(plainText("a\u2066b\u2069 \u200f")).toBe("ab");
  });

  it("keeps the ending of a long name and never cuts a character in two", () => {
    const name = cleanFileName(`${"\u{1F4E1}".repeat(300)}.csv`);
    expect(Array.from(name)).toHaveLength(255);
    expect(name.endsWith("\u{1F4E1}.csv")).toBe(true);
    expect(name).not.toMatch(/\p{Surrogate}/u);
  });

  it("names what has no name", () => {
    expect(cleanFileName(" \u202e ")).toBe("unnamed");
    expect(titleFromFileName(".csv")).toBe("Unnamed sweep");
    expect(titleFromFileName("after_the_choke.csv")).toBe("after the choke");
  });
});

describe("attachment", () => {
  it("encodes what the header's grammar does not allow", () => {
    expect(attachment("it's (1)*.csv")).toBe("attachment; filename*=UTF-8''it%27s%20%281%29-.csv");
  });

  it("is one safe header line for any name", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), (name) => {
        expect(attachment(name)).toMatch(/^attachment; filename\*=UTF-8''[A-Za-z0-9!#$&+.^_`|~%-]+$/);
      }),
    );
  });
});
