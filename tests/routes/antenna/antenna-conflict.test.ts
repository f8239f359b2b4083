import { parseWithZod } from "@conform-to/zod/v4";
import { describe, expect, it } from "vitest";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { antennaSchema } from "~/routes/antenna/antenna.schema";
import { antennaConflict, antennaWords } from "~/routes/antenna/antenna-conflict";
import { antennaFrom } from "~/routes/antenna/antenna-form";
import { mergeAntenna } from "~/services/antenna-changes";

const POLE = {
  key: "pole",
  kind: "vertical" as const,
  name: "Reed pole",
  lengthM: 10.2,
  count: 1,
  heightM: 0,
  diameterMm: 12,
  material: "",
  insulated: null,
  where: "",
};
const WAS: Antenna = { ...NO_ANTENNA, elements: [POLE], ground: "reeds" };

function ask(now: Antenna, wanted: Antenna) {
  const { antenna: merged, conflicts } = mergeAntenna(WAS, now, wanted);
  const others = { since: "2026-05-01T08:00", remark: "" };
  return antennaConflict({ wanted, now, merged, conflicts, unit: "metres", others });
}

/** What the form of the question asks for, with one side chosen everywhere. */
function answer(question: ReturnType<typeof ask>, side: "mine" | "theirs", now: Antenna): Antenna {
  const form = new FormData();
  form.set("intent", "keep");
  for (const [name, value] of Object.entries(question.conflict.rest)) form.set(name, value);
  for (const one of question.conflict.asked) form.set(one.name, one[side]);
  const read = parseWithZod(form, { schema: antennaSchema("metres") });
  if (read.status !== "success") throw new Error(JSON.stringify(read.error));
  return antennaFrom(read.value, now, "metres", () => "new");
}

describe("two who changed one antenna", () => {
  const now = { ...WAS, elements: [{ ...POLE, lengthM: 10.1 }], remarks: "mown" };
  const wanted = { ...WAS, elements: [{ ...POLE, lengthM: 10, diameterMm: 14 }] };
  const question = ask(now, wanted);

  it("asks the later one what both changed, by the name of its part, and nothing else", () => {
    expect(question.conflict.asked).toEqual([{ name: "elements[0].length", mine: "10 m", theirs: "10.1 m" }]);
    expect(question.labels["elements[0].length"]).toBe("Reed pole, length");
  });

  it("keeps what only one of them changed, whatever is chosen", () => {
    expect(answer(question, "mine", now)).toMatchObject({
      elements: [{ ...POLE, lengthM: 10, diameterMm: 14 }],
      ground: "reeds",
      remarks: "mown",
    });
    expect(answer(question, "theirs", now).elements).toEqual([{ ...POLE, lengthM: 10.1, diameterMm: 14 }]);
  });
});

describe("a part that one took down while the other changed it", () => {
  const shorter = { ...WAS, elements: [{ ...POLE, lengthM: 10 }] };
  const gone = { ...WAS, elements: [] };

  it.each([
    ["mine is the change", gone, shorter, "", "on"],
    ["mine is the taking down", shorter, gone, "on", ""],
  ])("is asked about as a whole: %s", (_, now, wanted, mine, theirs) => {
    const question = ask(now, wanted);
    expect(question.conflict.asked).toEqual([{ name: "elements[0].remove", mine, theirs }]);
    expect(answer(question, "mine", now).elements).toEqual(wanted.elements);
    expect(answer(question, "theirs", now).elements).toEqual(now.elements);
    expect(antennaWords("elements[0].remove", "on")).toBe("taken down");
  });
});
