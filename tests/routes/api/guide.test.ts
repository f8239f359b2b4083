import { execFileSync } from "node:child_process";
import { describe, expect, it } from "vitest";
import { curlOf } from "~/routes/api/guide/curl";
import { EXAMPLE_GROUPS, filledIn, keyOf } from "~/routes/api/guide/examples";
import { guideGroups } from "~/routes/api/guide/guide-groups";
import { sampleFile } from "~/routes/api/guide/sample-file";
import { openApiDocument } from "~/routes/api/openapi-document";

const examples = EXAMPLE_GROUPS.flatMap((group) => group.examples);

describe("curlOf", () => {
  it("is what a shell takes apart into the same words", () => {
    const json = { body: 'It\'s deep; $HOME `x` "y" \\ ü', n: 1 };
    const command = curlOf(
      { operation: "x", says: "", path: "/projects/k3f?sweep=a&sweep=b", json },
      "https://swale.example/api/v1",
    );
    // The shell itself says which words it hears.
    const script = `curl() { printf '%s\\0' "$@"; }; SWALE_TOKEN=tok; ${command}`;
    const words = execFileSync("sh", ["-c", script], { encoding: "utf8" }).split("\0").slice(0, -1);
    expect(words).toEqual([
      "-H",
      "Authorization: Bearer tok",
      "-H",
      "Content-Type: application/json",
      "-d",
      JSON.stringify(json),
      "https://swale.example/api/v1/projects/k3f?sweep=a&sweep=b",
    ]);
  });
});

describe("curlOf of other methods and files", () => {
  const about = { operation: "x", says: "", path: "/bundles/k3f" };
  it("says a method that no body says, where an answer goes, and each file", () => {
    expect(curlOf(about, "/v1", "DELETE")).toContain("-X DELETE");
    expect(curlOf(about, "/v1", "POST")).toContain("-X POST");
    expect(curlOf({ ...about, json: {} }, "/v1", "POST")).not.toContain("-X");
    expect(curlOf({ ...about, saves: "reeds.zip" }, "/v1")).toContain("-o reeds.zip");
    const open = { operation: "x", says: "", path: "/plates/k3f", open: true as const, accept: "text/csv" };
    expect(curlOf(open, "https://swale.example/api/v1").split(" \\\n  ")).toEqual([
      "curl",
      "-H 'Accept: text/csv'",
      "https://swale.example/plates/k3f",
    ]);
    expect(curlOf({ ...open, form: { source: "a&b" } }, "/v1", "POST")).toContain(
      "--data-urlencode 'source=a&b'",
    );
    const files = [
      { field: "files", name: "a.s1p" },
      { field: "table", name: "t.csv" },
    ];
    expect(curlOf({ ...about, files }, "/v1", "POST")).toMatch(/-F files=@a\.s1p \\\n {2}-F table=@t\.csv/);
  });
});

describe("the examples", () => {
  it("name what they take from others once it is there", () => {
    const given = new Set<string>(["origin"]);
    for (const { path, json, form, keep } of examples) {
      const taken = [
        ...`${path} ${JSON.stringify([json ?? "", form ?? ""])}`.matchAll(/\{([a-z]\w*)\}/gi),
      ].map(([, name]) => name);
      expect([...given]).toEqual(expect.arrayContaining(taken));
      for (const name of Object.keys(keep ?? {})) given.add(name);
    }
    expect(new Set(examples.map(keyOf)).size).toBe(examples.length);
    expect(filledIn({ a: ["#dip:{dip}", "{other}"] }, { dip: "x" })).toEqual({ a: ["#dip:x", "{other}"] });
  });

  it("stand in the guide with commands and answers that leave nothing open", () => {
    const groups = guideGroups(
      openApiDocument("https://swale.example").paths,
      "https://swale.example/api/v1",
    );
    const calls = groups.flatMap((group) => group.calls);
    expect(calls.flatMap((call) => call.examples)).toHaveLength(examples.length);
    for (const { key, command, answer } of calls.flatMap((call) => call.examples)) {
      expect(command, key).not.toMatch(/\/\{|:\{[a-z]+\}/i);
      // JSON, or words for what is none.
      if (!/^(Nothing$|[a-z]+\/[\w.+-]+, saved as )/.test(answer))
        expect(JSON.parse(answer), key).toBeTypeOf("object");
    }
  });

  it("send a file whose dip is where its first line says", () => {
    const text = sampleFile(7.1);
    expect(text.split("\n")).toHaveLength(124);
    const rows = text
      .split("\n")
      .slice(2, -1)
      .map((line) => line.split(" ").map(Number));
    const [mhz, re, im] = rows.reduce((a, b) => (Math.hypot(a[1], a[2]) < Math.hypot(b[1], b[2]) ? a : b));
    expect(mhz).toBeCloseTo(7.1, 1);
    // 60 Ω against 50 Ω: (60 − 50) / (60 + 50).
    expect(re).toBeCloseTo(1 / 11, 2);
    expect(im).toBeCloseTo(0, 1);
  });
});
