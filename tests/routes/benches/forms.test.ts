import { parseWithZod } from "@conform-to/zod/v4";
import { describe, expect, it } from "vitest";
import { newBenchSchema, parseWish, rebuildSchema } from "~/routes/benches/benches.schema";
import { versionForm } from "~/routes/benches/version-form";
import { knownWords, spanWords } from "~/routes/benches/words";

const parse = (fields: Record<string, string>) => {
  const form = new FormData();
  for (const [name, value] of Object.entries({ name: "Bridge", validFrom: "2026-05-03", ...fields })) {
    form.append(name, value);
  }
  return parseWithZod(form, { schema: newBenchSchema });
};

describe("the form of a bench", () => {
  it("takes figures in their own units to SI, with a decimal comma too; empty is not known", () => {
    const submission = parse({
      "standards.openCapacitanceF": "49,4",
      "standards.loadOhm": "49.6",
      "given.zeroDb": "-22",
    });
    if (submission.status !== "success") throw new Error(JSON.stringify(submission.error));
    expect(submission.value.standards).toEqual({
      openCapacitanceF: 49.4e-15,
      shortInductanceH: null,
      offsetDelayS: null,
      loadOhm: 49.6,
      loadReturnLossDb: null,
    });
    expect(submission.value.given.zeroDb).toBe(-22);
    expect(submission.value.own).toBe("no");
    const back = versionForm(submission.value);
    expect(back.standards.openCapacitanceF).toBe("49.4");
    expect(back.standards.loadReturnLossDb).toBe("");
    expect(back.validFrom).toBe("2026-05-03");
  });

  it.each([
    ["standards.loadOhm", "-50"],
    ["standards.loadOhm", "fifty"],
    ["given.directivityDb", "140"],
    ["validFrom", "2999-01-01"],
    ["validFrom", "yesterday"],
    ["name", ""],
  ])("refuses %s = %s", (name, value) => {
    const submission = parse({ [name]: value });
    expect(submission.status).toBe("error");
    expect(Object.keys(submission.reply().error ?? {})).toEqual([name]);
  });

  it("leaves out empty parts", () => {
    const submission = parse({
      "parts[0].kind": "cable",
      "parts[1].kind": "connector",
      "parts[1].text": " N ",
    });
    expect(submission.status === "success" && submission.value.parts).toEqual([
      { kind: "connector", text: "N" },
    ]);
  });

  it("asks of a rebuilt one what was rebuilt", () => {
    const form = new FormData();
    form.append("validFrom", "2026-05-03");
    expect(Object.keys(parseWithZod(form, { schema: rebuildSchema }).reply().error ?? {})).toEqual([
      "remark",
    ]);
  });
});

describe("the wish", () => {
  it.each([
    ["", 1.5, 0.1],
    ["swr=1,2&tolerance=0.05", 1.2, 0.05],
    ["swr=1&tolerance=0", 1.5, 0.1],
    ["swr=NaN&tolerance=-1", 1.5, 0.1],
    ["swr=Infinity", 1.5, 0.1],
  ])("is read from %s", (search, swr, tolerance) => {
    expect(parseWish(new URLSearchParams(search))).toEqual({ swr, tolerance });
  });

  it("is told in words, rounded inwards", () => {
    const plain = (text: string) => text.replace(/\s/g, " ");
    expect(plain(spanWords({ fromHz: 1_800_040, toHz: 29_999_600 }))).toBe("1.801 MHz to 29.99 MHz");
    const wish = { swr: 1.5, tolerance: 0.1 };
    expect(knownWords(wish, [])).toBe("An SWR of 1.5 is known to ±0.1 nowhere yet.");
    const many = Array.from({ length: 6 }, (_, i) => ({
      fromHz: (2 * i + 1) * 1e6,
      toHz: (2 * i + 2) * 1e6,
    }));
    expect(plain(knownWords(wish, many))).toMatch(/from 1 MHz to 2 MHz, .* and in 2 shorter stretches\.$/);
  });
});
