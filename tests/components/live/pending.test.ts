import { describe, expect, it } from "vitest";
import { Pending } from "../../../app/components/live/pending.ts";
import { event } from "./events.ts";

const note = (n: number) => event(n, "note.added", { note: `n${n}` });
const ids = (pending: Pending) => pending.events.map(({ id }) => id);

describe("what is not on the page yet", () => {
  it("is what came in since the page was drawn, each once", () => {
    const pending = new Pending("m0");
    for (const n of [1, 2, 2, 1, 3]) pending.take(note(n));
    expect(ids(pending)).toEqual(["m1", "m2", "m3"]);
  });

  it("loses what a new drawing holds, and keeps what came in while it was drawn", () => {
    const pending = new Pending("m0");
    for (const n of [1, 2, 3]) pending.take(note(n));
    pending.draw("m2");
    expect(ids(pending)).toEqual(["m3"]);
    pending.draw("m2");
    expect(ids(pending)).toEqual(["m3"]);
  });

  it("takes nothing that a drawing was ahead of, whatever comes in late", () => {
    const pending = new Pending("m0");
    pending.take(note(1));
    pending.draw("m4");
    expect(ids(pending)).toEqual([]);
    for (const n of [2, 3, 4, 5]) pending.take(note(n));
    expect(ids(pending)).toEqual(["m5"]);
  });

  it("is not brought back by the answer of an older question", () => {
    const pending = new Pending("m0");
    for (const n of [1, 2, 3]) pending.take(note(n));
    pending.draw("m3");
    pending.take(note(4));
    pending.draw("m1");
    expect(ids(pending)).toEqual(["m4"]);
  });

  it("begins anew after too much was missed", () => {
    const pending = new Pending("m0");
    pending.take(note(1));
    pending.skipTo("m9");
    pending.take(note(10));
    expect(ids(pending)).toEqual(["m10"]);
    pending.draw("m9");
    expect(ids(pending)).toEqual(["m10"]);
  });
});
