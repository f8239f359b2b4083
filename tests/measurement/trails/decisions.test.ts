import { describe, expect, it } from "vitest";
import { agree, type TrailDecision, withoutDip } from "../../../app/measurement/trails/decisions.ts";

const same = (a: string, b: string): TrailDecision => ({ kind: "same", a, b });
const apart = (a: string, b: string): TrailDecision => ({ kind: "apart", a, b });
/** "a1" is dip a of sweep 1; "x" is in no sweep any more. */
const sweepOf = (id: string) => id[1];

describe("agree", () => {
  it("joins through others, also through a dip that is gone", () => {
    const agreed = agree([same("a1", "x"), same("x", "a3")], sweepOf);
    expect([...agreed.groupOf("a1")].sort()).toEqual(["a1", "a3", "x"]);
    expect(agreed.groupOf("b1")).toEqual(new Set(["b1"]));
    expect(agreed.overruled).toEqual([]);
  });

  it("keeps apart whatever is the same as either", () => {
    const agreed = agree([same("a1", "a2"), same("b3", "b4"), apart("a2", "b3")], sweepOf);
    expect(agreed.isApart("a1", "b4")).toBe(true);
    expect(agreed.isApart("b4", "a1")).toBe(true);
    expect(agreed.isApart("a1", "c1")).toBe(false);
  });

  it("lets the newest outrank the older ones", () => {
    const older = same("a1", "a2");
    const agreed = agree([older, apart("a1", "a2")], sweepOf);
    expect(agreed.isApart("a1", "a2")).toBe(true);
    expect(agreed.overruled).toEqual([older]);
    const rejoined = agree([apart("a1", "a2"), older], sweepOf);
    expect(rejoined.groupOf("a1").has("a2")).toBe(true);
    expect(rejoined.overruled).toEqual([apart("a1", "a2")]);
  });

  it("never puts two dips of one sweep on one trail", () => {
    const older = same("a1", "a2");
    expect(agree([older, same("b1", "a2")], sweepOf).overruled).toEqual([older]);
  });
});

describe("withoutDip", () => {
  it("contracts what went through the dip", () => {
    expect(withoutDip([same("a1", "b2"), same("b2", "c3")], "b2")).toEqual([same("a1", "c3")]);
    expect(withoutDip([same("a1", "b2"), apart("c3", "b2")], "b2")).toEqual([apart("a1", "c3")]);
    expect(withoutDip([apart("a1", "b2"), same("b2", "c3")], "b2")).toEqual([apart("a1", "c3")]);
  });

  it("concludes nothing from two that keep apart", () => {
    expect(withoutDip([apart("a1", "b2"), apart("b2", "c3")], "b2")).toEqual([]);
  });

  it("leaves the others, and makes one of each pair", () => {
    const others = [same("x1", "y2"), same("a1", "b2"), same("b2", "c3"), same("d4", "b2")];
    expect(withoutDip(others, "b2")).toEqual([
      same("x1", "y2"),
      same("a1", "c3"),
      same("a1", "d4"),
      same("c3", "d4"),
    ]);
  });
});
