import { describe, expect, it } from "vitest";
import { concerns, hereOf } from "../../../app/components/live/here.ts";
import { isGone, lookingWords, newNotes, newsWords, ofOthers } from "../../../app/components/live/words.ts";
import { EVENT_KINDS } from "../../../app/services/event-kinds.ts";
import { event } from "./events.ts";

const story = hereOf("p1", "/projects/p1");
const sweep = hereOf("p1", "/projects/p1/sweeps/s1");

describe("where a person is", () => {
  it("is told from the address", () => {
    expect(story).toMatchObject({ kind: "project", subject: "story", area: "", form: false });
    expect(sweep).toMatchObject({ kind: "sweep", subject: "s1", form: false });
    expect(hereOf("p1", "/projects/p1/dips/d1", { sweep: "s1" })).toMatchObject({ kind: "dip", sweep: "s1" });
    expect(hereOf("p1", "/projects/p1/steps")).toMatchObject({ kind: "project", subject: "steps" });
    for (const path of ["sweeps/new", "sweeps/s1/reading", "steps/t1/edit", "settings", "antenna/edit"]) {
      expect(hereOf("p1", `/projects/p1/${path}`).form, path).toBe(true);
    }
  });
});

describe("what concerns a page", () => {
  it("is what it shows", () => {
    const dip = hereOf("p1", "/projects/p1/dips/d1", { sweep: "s1", trail: "t1" });
    const onDip = event(1, "note.added", { note: "n1", dip: "d1", sweep: "s1" });
    const onOther = event(2, "note.added", { note: "n2", dip: "d2", sweep: "s1" });
    const anew = event(3, "sweep.analysed", { sweep: "s1" });
    expect([onDip, onOther, anew].map((one) => concerns(one, dip))).toEqual([true, false, true]);
    expect([onDip, onOther, anew].map((one) => concerns(one, sweep))).toEqual([true, true, true]);
    const ofBench = event(5, "photograph.added", { bench: "b1" });
    const ofAntenna = event(6, "photograph.added");
    const [antenna, bench] = ["antenna", "benches/b1"].map((end) => hereOf("p1", `/projects/p1/${end}`));
    expect([ofBench, ofAntenna].map((one) => concerns(one, antenna))).toEqual([false, true]);
    expect([ofBench, ofAntenna].map((one) => concerns(one, bench))).toEqual([true, false]);
    const verdictOf = (trail: string) => event(7, "verdict.given", { trail });
    expect([verdictOf("t1"), verdictOf("t2")].map((one) => concerns(one, dip))).toEqual([true, false]);
    expect(concerns(event(4, "sweep.analysed", { sweep: "s2" }), sweep)).toBe(false);
    expect(concerns(event(5, "sweep.added", { sweep: "s2" }), story)).toBe(true);
    expect(concerns(event(6, "antenna.changed"), story)).toBe(false);
  });

  it("is nothing while a form is filled in", () => {
    const reading = hereOf("p1", "/projects/p1/sweeps/s1/reading");
    expect(concerns(event(1, "sweep.analysed", { sweep: "s1" }), reading)).toBe(false);
  });
});

describe("the words for it", () => {
  it("count, and name who did it where it was one person", () => {
    const notes = [1, 2].map((n) => event(n, "note.added", { note: `n${n}` }));
    expect(newsWords(notes, story)).toBe("2 new notes, by Cleo");
    expect(newsWords([...notes, event(3, "sweep.added", {}, "Bram")], story)).toBe(
      "2 new notes and 1 new sweep",
    );
    expect(newsWords([], story)).toBe("");
  });

  it("speak of the very thing that is shown", () => {
    const anew = event(1, "sweep.analysed", { sweep: "s1" });
    expect(newsWords([anew], sweep)).toBe("analysed anew, by Cleo");
    expect(newsWords([anew], story)).toBe("1 sweep analysed anew, by Cleo");
    const gone = event(2, "sweep.deleted", { sweep: "s1" });
    expect([isGone([gone], sweep), isGone([gone], story)]).toEqual([true, false]);
  });

  it("leave out a note that was taken back, and count one that was changed at once as new", () => {
    const added = event(1, "note.added", { note: "n1" });
    const edited = event(2, "note.edited", { note: "n1" });
    const removed = event(3, "note.removed", { note: "n1" });
    expect(newsWords([added, edited], story)).toBe("1 new note, by Cleo");
    expect(newsWords([added, edited, removed], story)).toBe("");
    expect(newsWords([edited], story)).toBe("1 note changed, by Cleo");
    const back = event(5, "note.edited", { note: "n1" });
    expect(newsWords([added, removed, back], story), "brought back").toBe("1 new note, by Cleo");
    expect(newNotes([added, event(4, "note.added", { note: "n4" }), removed])).toEqual(["n4"]);
  });

  it("are none of what one did oneself, but for what takes the page's own thing away", () => {
    const [own, other] = [event(1, "sweep.added", {}, "Ada"), event(2, "step.added")];
    const gone = event(3, "sweep.deleted", { sweep: "s1" }, "Ada");
    expect(ofOthers([own, other, gone], "ada", sweep)).toEqual([other, gone]);
    expect(ofOthers([own, other, gone], "ada", story)).toEqual([other]);
    expect(ofOthers([own, other], "", sweep)).toEqual([own, other]);
  });

  it("exist for everything that can happen", () => {
    for (const kind of EVENT_KINDS) expect(newsWords([event(1, kind)], story), kind).not.toBe("");
  });
});

describe("who is looking", () => {
  const at = (name: string, kind: string, subject: string) => ({
    name,
    userName: name.toLowerCase(),
    kind,
    subject,
  });

  it("is everybody but oneself, those on the same page first", () => {
    const lookers = [at("Ada", "sweep", "s1"), at("Bram", "dip", "d1"), at("Cleo", "sweep", "s1")];
    expect(lookingWords(lookers, "ada", sweep)).toBe("Cleo is here; Bram is looking at a dip");
    expect(lookingWords(lookers.slice(0, 1), "ada", sweep)).toBe("");
  });

  it("names each person once, and a crowd by number", () => {
    const twice = [at("Bram", "dip", "d1"), at("Bram", "sweep", "s1"), at("Bram", "step", "t1")];
    expect(lookingWords(twice, "ada", sweep)).toBe("Bram is here");
    const crowd = ["A", "B", "C", "D", "E", "F"].map((name) => at(name, "project", "members"));
    expect(lookingWords(crowd, "ada", sweep)).toBe("A, B, C and 3 more are in the project");
  });
});
