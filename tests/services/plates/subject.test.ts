import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { CODE_VERSION } from "../../../app/services/plates/code-version.ts";
import { formOf } from "../../../app/services/plates/form-names.ts";
import { subjectOf, subjectText } from "../../../app/services/plates/subject.ts";

describe("subjectOf", () => {
  it("reads what it writes", () => {
    for (const from of [
      "strip",
      "sweep:ab2cd",
      "dip:x",
      "compare:a,b",
      "compare:a,b,c,d,e,f,g,h",
      "trail:t",
      "bench:b",
    ]) {
      const subject = subjectOf(from);
      expect(subject && subjectText(subject)).toBe(from);
    }
  });

  it("takes nothing else", () => {
    for (const from of [
      "",
      "sweep",
      "sweep:",
      "sweep:a,b",
      "compare:a",
      "compare:a,a",
      "compare:a,b,c,d,e,f,g,h,i",
      "strip:a",
      "note:a",
      "sweep:a b",
    ])
      expect(subjectOf(from), from).toBeNull();
  });
});

describe("formOf", () => {
  const of = (ending: Parameters<typeof formOf>[0], query = "") => formOf(ending, new URLSearchParams(query));
  it("finds the form behind an address", () => {
    expect(of("svg")).toBe("svg-light");
    expect(of("svg", "theme=dark&width=narrow")).toBe("svg-dark-narrow");
    expect(of("png")).toBe("png-1280-light");
    expect(of("png", "width=640&theme=dark")).toBe("png-640-dark");
    expect(of("csl.json")).toBe("csl");
    expect(of("/embed")).toBe("embed");
    expect(of("pdf")).toBe("pdf");
  });

  it("has none for other sizes and themes", () => {
    for (const query of ["width=641", "width=", "width=NaN", "theme=red"])
      expect(of("png", query), query).toBeNull();
    expect(of("svg", "width=300")).toBeNull();
  });
});

it("names the version of this program", () => {
  const { version } = JSON.parse(readFileSync(new URL("../../../package.json", import.meta.url), "utf8"));
  expect(CODE_VERSION).toBe(version);
});
