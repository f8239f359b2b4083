import { describe, expect, it } from "vitest";
import { CHAPTERS } from "../../../app/routes/methods/definitions/chapters.ts";
import { workExample } from "../../../app/routes/methods/example-values.ts";
import { renderFormula } from "../../../app/routes/methods/formula.server.ts";

/** Truth: check values of REFERENCE sections 1, 2, 5 to 8, with their sources there. */
const definitions = CHAPTERS.flatMap((chapter) => chapter.definitions);

function worked(id: string, values: Record<string, string> = {}) {
  const definition = definitions.find((one) => one.id === id);
  if (!definition) throw new Error(`No definition ${id}`);
  const search = new URLSearchParams(Object.entries(values).map(([name, value]) => [`${id}.${name}`, value]));
  return workExample(definition, search);
}

function told(id: string, label: string, values: Record<string, string> = {}): string | undefined {
  return worked(id, values)
    .rows?.find((row) => row.label === label)
    ?.value.replaceAll("\u2009", " ");
}

describe("the methods", () => {
  it("have each an anchor of its own and say source and limits", () => {
    expect(new Set(definitions.map(({ id }) => id)).size).toBe(definitions.length);
    for (const { id, says, source, limits, formulas } of definitions) {
      expect(id).toMatch(/^[a-z-]+$/);
      for (const text of [says, source, limits]) expect(text.length, id).toBeGreaterThan(30);
      expect(formulas.length, id).toBeGreaterThan(0);
    }
  });

  it.each(definitions.map(({ id, formulas }) => [id, formulas] as const))(
    "%s: formulas draw",
    (_, formulas) => {
      for (const tex of formulas) expect(renderFormula(tex)).toContain("<math");
    },
  );

  it.each(definitions.map(({ id }) => id))(
    "%s: its example works as it stands and at both ends of every field",
    (id) => {
      const fields = definitions.find((one) => one.id === id)?.example.fields ?? [];
      expect(worked(id).rows?.length).toBeGreaterThan(0);
      for (const field of fields) {
        for (const value of field.choices ?? [field.least, field.most]) {
          const { rows } = worked(id, { [field.name]: String(value) });
          expect(rows, `${id}.${field.name} = ${value}`).not.toBeNull();
          for (const row of rows ?? [])
            expect(row.value, `${id}.${field.name} = ${value}`).not.toMatch(/NaN|undefined|null/);
        }
      }
    },
  );

  it("say what is wrong with a value, reckon nothing, and keep what was typed", () => {
    const { fields, rows } = worked("swr", { loss: "fourteen" });
    expect(rows).toBeNull();
    expect(fields[0]).toMatchObject({ text: "fourteen", error: "Write a number from -3 to 80." });
    expect(worked("swr", { loss: "81" }).rows).toBeNull();
    expect(worked("lowest-swr", { points: "40.5" }).fields[2].error).toBe("Write a whole number.");
    expect(worked("feedline", { cable: "string" }).fields[0].error).toBe("That is not among the choices.");
    expect(worked("swr", { loss: " " }).rows).not.toBeNull();
    expect(told("swr", "SWR", { loss: "9,5424" })).toBe("2.00");
  });
});

describe("worked examples give the reference's values", () => {
  it.each([
    ["return-loss", "Return loss", { gamma: "0.2" }, "13.98 dB"],
    ["return-loss", "Reflected power", { gamma: "0.2" }, "4 %"],
    ["swr", "SWR", { loss: "20" }, "1.22"],
    ["mismatch-loss", "Mismatch loss", { swr: "3" }, "1.25 dB"],
    ["other-reference", "SWR in 50 Ω", {}, "2.18"],
    ["other-reference", "SWR in 75 Ω", {}, "1.76"],
    ["bandwidth", "Width", {}, "834 kHz"],
    ["bandwidth", "Edges", {}, "13.7392 MHz to 14.573 MHz"],
    ["bandwidth", "Width", { r: "110" }, "none: the limit is not reached"],
    ["q", "With phase", { r: "36", q: "12" }, "12"],
    // D 40, M 30, T 0.1 dB, 20 dB read: 19.057 to 21.059 to first order; by the whole model 0.11/(1 − 0.01158 − 0.0316·0.11) and
    // 0.09/(1 + 0.01158 + 0.0316·0.09), by hand.
    ["directivity", "Return loss", {}, "between 19.04 and 21.04 dB"],
    ["directivity", "Return loss", { match: "80", tracking: "0", loss: "30" }, "between 27.61 and 33.3 dB"],
    ["three-term", "Corrected", {}, "2.18"],
    ["impedance", "Impedance", {}, "50.0 + j57.7 Ω"],
    ["bands", "Band", { region: "2" }, "40 m"],
    ["bands", "Band", { region: "1" }, "none"],
    ["l-network", "One in series", { r: "50", x: "40" }, "282 pF, SWR 1.00"],
    ["side", "Side of 50 Ω", { r: "36", directivity: "30" }, "under"],
    ["side", "Side of 50 Ω", { r: "49", directivity: "30" }, "too near to tell"],
    ["trails", "Trail 1", {}, "7.1 MHz became 7.35 MHz"],
    // 10.14 m, 13.95 to 14.20 MHz: 9.9615 m.
    ["trim", "In proportion", { now: "10.14", nowMhz: "13.95", wanted: "14.2" }, "9.961 m"],
  ])("%s: %s", (id, label, values, expected) => {
    expect(told(id, label, values)).toBe(expected);
  });

  it("uncertainty: about 95 of 100 intervals hold the truth", () => {
    const [held, of] = (told("uncertainty", "Intervals of the frequency that hold the truth") ?? "")
      .split(" of ")
      .map(Number);
    expect(of).toBe(60);
    expect(held).toBeGreaterThanOrEqual(52);
  });
});
