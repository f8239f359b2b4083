import { parseWithZod } from "@conform-to/zod/v4";
import { describe, expect, it } from "vitest";
import { quantityLines, stepConflict } from "~/routes/steps/step-conflict";
import { stepSchema } from "~/routes/steps/steps.schema";

const theirs = {
  title: "Cut the pole",
  body: "With a saw.",
  state: "done",
  at: "2026-05-02T10:00",
  quantities: [{ target: "pole.lengthM", to: "10.1" }],
};
const sent = {
  ...theirs,
  title: "Trimmed the pole",
  body: "",
  quantities: [{ target: "pole.lengthM", to: "10" }, {}],
};
const now = { title: theirs.title, body: theirs.body, at: null, quantities: "[]" };

describe("stepConflict", () => {
  const conflict = stepConflict({
    sent,
    theirs,
    conflicts: ["quantities"],
    mine: ["title"],
    now,
    confirmed: true,
  });

  it("asks what both changed; of the rest each keeps what only they changed", () => {
    expect(conflict.asked).toEqual([
      {
        name: "quantities",
        mine: JSON.stringify([{ target: "pole.lengthM", to: "10" }]),
        theirs: JSON.stringify(theirs.quantities),
      },
    ]);
    expect(conflict.rest).toEqual({
      title: sent.title,
      body: theirs.body,
      at: theirs.at,
      state: "done",
      confirm: "on",
    });
    expect(conflict.was).toBe(JSON.stringify(now));
  });

  it("is sent as the form of the step is, with either side", () => {
    for (const side of ["mine", "theirs"] as const) {
      const form = new FormData();
      form.set("intent", "keep");
      for (const [name, value] of Object.entries(conflict.rest)) form.set(name, value);
      form.set("quantities", conflict.asked[0][side]);
      const read = parseWithZod(form, { schema: stepSchema("metres") });
      expect(read.status === "success" && read.value.quantities).toMatchObject([
        { to: side === "mine" ? 10 : 10.1, target: { part: "pole", field: "lengthM" } },
      ]);
    }
  });

  it("refuses quantities that are no rows", () => {
    const form = new FormData();
    for (const [name, value] of Object.entries(conflict.rest)) form.set(name, value);
    form.set("intent", "keep");
    form.set("quantities", "{");
    expect(parseWithZod(form, { schema: stepSchema("metres") }).status).toBe("error");
  });
});

describe("quantityLines", () => {
  it("says each quantity in a line, by the part's name", () => {
    const targets = [{ value: "pole.lengthM", label: "Pole (old), length (10.2 m)" }];
    const rows = [
      { target: "pole.lengthM", to: "10" },
      { label: "Turns", from: "3", to: "5", unit: "turns" },
    ];
    expect(quantityLines(JSON.stringify(rows), targets)).toBe("Pole (old), length: 10\nTurns: 3 → 5 turns");
    expect(quantityLines("{", targets)).toBe("");
  });
});
