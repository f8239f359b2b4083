import { describe, expect, test } from "vitest";
import {
  errorsOf,
  plateSchema,
  textsOfChoices,
  textsOfForm,
  withdrawSchema,
} from "../../../app/routes/plates/plates.schema.ts";
import { defaultsFor } from "../../../app/services/plates/choices.ts";

const form = (fields: Record<string, string>) => {
  const data = new FormData();
  for (const [name, value] of Object.entries(fields)) data.set(name, value);
  return data;
};
const FIELDS = {
  title: " The dip ",
  caption: "one\r\ntwo",
  licence: "CC0-1.0",
  low: "6,9",
  high: "",
  scale: "log",
  quantity: "swr",
  showDips: "on",
  "label.k3f": " Before ",
};

describe("the form of a plate", () => {
  test("is read with a decimal comma, an empty end and boxes that were not ticked", () => {
    const choices = plateSchema.parse(textsOfForm(form(FIELDS)));
    expect(choices).toEqual({
      title: "The dip",
      caption: "one\ntwo",
      licence: "CC0-1.0",
      fromHz: 6.9e6,
      toHz: null,
      scale: "log",
      quantity: "swr",
      showBands: false,
      showDips: true,
      showLimits: false,
      showTitle: false,
      labels: { k3f: "Before" },
    });
  });

  test("comes back from choices as it was", () => {
    const choices = { ...defaultsFor({ title: "A" }), fromHz: 7.081234e6, toHz: 1e7 };
    expect(plateSchema.parse(textsOfChoices(choices))).toEqual(choices);
  });

  test.each([
    [{ title: " " }, "title"],
    [{ title: "x".repeat(161) }, "title"],
    [{ caption: "x".repeat(2001) }, "caption"],
    [{ licence: "mine" }, "licence"],
    [{ low: "seven" }, "low"],
    [{ low: "8", high: "7" }, "high"],
    [{ low: "-1" }, "low"],
    [{ low: "", high: "0" }, "high"],
    [{ scale: "square" }, "scale"],
  ])("says what is wrong with %o", (change, field) => {
    const parsed = plateSchema.safeParse(textsOfForm(form({ ...FIELDS, ...change })));
    expect(Object.keys(parsed.error ? errorsOf(parsed.error) : {})).toEqual([field]);
  });

  test("asks for a reason to withdraw", () => {
    expect(withdrawSchema.safeParse({ intent: "withdraw", reason: "  " }).success).toBe(false);
    expect(withdrawSchema.safeParse({ intent: "withdraw", reason: "Not ours." }).success).toBe(true);
  });
});
