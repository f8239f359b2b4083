import { describe, expect, it } from "vitest";
import { type Antenna, type AntennaElement, NO_ANTENNA } from "~/measurement/antenna";
import { applyQuantities, carryOn, changesBetween, entryAt, mergeAntenna } from "~/services/antenna-changes";
import { changesInWords } from "~/services/antenna-words";
import { resolveQuantities } from "~/services/step-quantities";

/** Invented. */
function element(key: string, more: Partial<AntennaElement> = {}): AntennaElement {
  return {
    key,
    kind: "vertical",
    name: `pole ${key}`,
    lengthM: 10.2,
    count: 1,
    heightM: 0,
    diameterMm: null,
    material: "",
    insulated: null,
    where: "",
    ...more,
  };
}

const REEDS: Antenna = {
  elements: [element("a"), element("b", { lengthM: 4.1, insulated: false })],
  feedline: { cable: "RG-58", lengthM: 12, velocityFactor: null, route: "" },
  choke: null,
  ground: "wet reed bank",
  remarks: "",
};

function withLength(antenna: Antenna, key: string, lengthM: number | null): Antenna {
  return {
    ...antenna,
    elements: antenna.elements.map((one) => (one.key === key ? { ...one, lengthM } : one)),
  };
}

describe("changesBetween", () => {
  it("finds nothing between equal antennas, and each entry that differs", () => {
    expect(changesBetween(REEDS, structuredClone(REEDS))).toEqual([]);
    expect(changesBetween(REEDS, withLength(REEDS, "a", 10))).toEqual([
      { path: "a.lengthM", was: 10.2, now: 10 },
    ]);
  });

  it("takes an empty feedline or choke for none", () => {
    const empty = { ...REEDS, choke: { turns: null, core: "", where: "" } };
    expect(changesBetween(REEDS, empty)).toEqual([]);
  });
});

describe("mergeAntenna", () => {
  it("keeps what two people changed in two places", () => {
    const theirs = withLength(REEDS, "b", 4);
    const mine = { ...withLength(REEDS, "a", 10), ground: "dry" };
    const { antenna, conflicts } = mergeAntenna(REEDS, theirs, mine);
    expect(conflicts).toEqual([]);
    expect(antenna).toEqual({ ...withLength(withLength(REEDS, "a", 10), "b", 4), ground: "dry" });
  });

  it("says where both changed one entry, and takes neither side", () => {
    const { antenna, conflicts } = mergeAntenna(
      REEDS,
      withLength(REEDS, "a", 10.1),
      withLength(REEDS, "a", 10),
    );
    expect(conflicts).toEqual([{ path: "a.lengthM", was: 10.1, now: 10 }]);
    expect(antenna.elements[0].lengthM).toBe(10.1);
  });

  it("adds and removes elements, and a removal meets a change of the same one", () => {
    const more = { ...REEDS, elements: [...REEDS.elements, element("c")] };
    const fewer = { ...REEDS, elements: [REEDS.elements[0]] };
    expect(mergeAntenna(REEDS, more, fewer).antenna.elements.map(({ key }) => key)).toEqual(["a", "c"]);
    const conflicts = mergeAntenna(REEDS, withLength(REEDS, "b", 4), fewer).conflicts;
    expect(conflicts.map(({ path }) => path)).toEqual(["b.lengthM"]);
  });

  it("begins with nothing", () => {
    expect(mergeAntenna(NO_ANTENNA, NO_ANTENNA, REEDS).antenna).toEqual(REEDS);
  });
});

describe("carryOn", () => {
  it("runs on until a later version changed the entry for itself", () => {
    const later = [
      REEDS,
      { ...REEDS, ground: "mown" },
      withLength(REEDS, "a", 9.5),
      withLength(REEDS, "a", 10.2),
    ];
    const carried = carryOn(REEDS, withLength(REEDS, "a", 10), later);
    expect(carried.map((one) => one.elements[0].lengthM)).toEqual([10, 10, 9.5, 10.2]);
    expect(carried[1].ground).toBe("mown");
  });

  it("undoes itself", () => {
    const changed = withLength(REEDS, "a", 10);
    const later = [REEDS, { ...REEDS, choke: { turns: 9, core: "ring", where: "" } }];
    expect(carryOn(changed, REEDS, carryOn(REEDS, changed, later))).toEqual(later);
  });
});

describe("quantities of a step", () => {
  const target = { part: "a", field: "lengthM" } as const;
  const cut = { label: "pole a", unit: "m", from: null, to: 10, target };

  it("take from the antenna what it was, and put there what it became", () => {
    const { quantities, problem } = resolveQuantities([cut], REEDS);
    expect(problem).toBeNull();
    expect(quantities[0].from).toBe(10.2);
    expect(entryAt(applyQuantities(REEDS, quantities), target)).toBe(10);
    expect(REEDS.elements[0].lengthM).toBe(10.2);
  });

  it("believe the person where the antenna says nothing", () => {
    const { quantities } = resolveQuantities([{ ...cut, from: 10.3 }], withLength(REEDS, "a", null));
    expect(quantities[0].from).toBe(10.3);
  });

  it.each([
    [
      "a part that was not there",
      { ...cut, target: { part: "z", field: "lengthM" as const } },
      /no such part/,
    ],
    ["what the antenna says otherwise", { ...cut, from: 10.5 }, /says 10.2 m there, not 10.5 m/],
    ["a change to nothing", { ...cut, to: null }, /became/],
  ])("refuse %s", (_, quantity, message) => {
    const { problem } = resolveQuantities([{ ...cut, target: null }, quantity], REEDS);
    expect(problem).toMatchObject({ index: 1, message: expect.stringMatching(message) });
  });

  it("can't point at an antenna that is not described", () => {
    expect(resolveQuantities([cut], null).problem?.message).toMatch(/not described for that day/);
    expect(resolveQuantities([{ ...cut, target: null }], null).problem).toBeNull();
  });

  it("give a choke that was not said its turns", () => {
    const turns = {
      label: "choke",
      unit: "turns",
      from: null,
      to: 12,
      target: { part: "choke", field: "turns" as const },
    };
    const { quantities } = resolveQuantities([turns], REEDS);
    expect(applyQuantities(REEDS, quantities).choke).toEqual({ turns: 12, core: "", where: "" });
  });
});

describe("changesInWords", () => {
  it("names what came, what went and what differs, in the person's unit", () => {
    const now = {
      ...withLength(REEDS, "a", 10),
      elements: [
        { ...REEDS.elements[0], lengthM: 10 },
        element("c", { kind: "radial", name: "", lengthM: 5 }),
      ],
      ground: "mown",
    };
    expect(changesInWords(REEDS, now, "metres")).toEqual([
      "radial added, 5\u2009m",
      "pole b removed",
      "pole a, length: 10.2\u2009m → 10\u2009m",
      "ground written",
    ]);
    expect(changesInWords(REEDS, withLength(REEDS, "a", null), "feet")).toEqual([
      "pole a, length: 33\u2009ft 5 5/8\u2009in → not said",
    ]);
  });
});
