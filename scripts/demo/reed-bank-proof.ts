import { LIGHT_SPEED } from "./antenna.ts";
import { changed, done, pictured, planned } from "./deeds.ts";
import { pictureOf } from "./pictures.ts";
import { counts, makes } from "./quantities.ts";
import { AS_BUILT, MORE_RADIALS, type reedBankFiles, STAKE_FAR, STAKE_NEAR } from "./reed-bank.ts";
import { adopted, said, swept } from "./steps.ts";
import { on, type Step } from "./story.ts";
import { khz, mhz, percent } from "./told.ts";

const FREE_M = AS_BUILT.braidM ?? 0;
const FAR_M = STAKE_FAR.braidM ?? 0;
const NEAR_M = STAKE_NEAR.braidM ?? 0;

/** Late March and April: the suspicion is tried, from four sides, until nothing else is left. */
export function proof(files: ReturnType<typeof reedBankFiles>): Step[] {
  return [
    changed("ada-marsh", on(3, 28, 13, 50), {
      key: "radials",
      title: "Sixteen more radials",
      body: "Same wire, same 7 m, between the old ones.",
      quantities: [makes("radials", "count", "Radials, count", MORE_RADIALS.radials)],
    }),
    swept({
      key: "radials",
      by: "ada-marsh",
      at: on(3, 28, 14, 30),
      title: `${MORE_RADIALS.radials} radials`,
      fileName: "Schilf_24_Radials.txt",
      bytes: files.radials,
      bench: "bridge",
    }),
    said(
      "bram-sedge",
      on(3, 28, 17, 20),
      { sweep: "radials", nearMhz: 7.12 },
      (t) =>
        `Sixteen more radials, a whole afternoon on our knees, and 40 m got worse: SWR ${t.dip("bothCut", 7.12).s} before, ${t.dip("radials", 7.12).s} now. Can we have the afternoon back?`,
      { key: "worse" },
    ),
    said(
      "dov-heron",
      on(3, 28, 18, 3),
      { sweep: "radials", nearMhz: 7.12 },
      (t) =>
        `It got better. The resistance of a short ground system is radiation plus loss, and yours happened to add up to nearly 50 Ω. Less loss means less than 50 Ω, so more SWR and more signal. The width tells it without any phase: ${t.dip("bothCut", 7.12).w} before, ${t.dip("radials", 7.12).w} now. What only warms the ground makes a dip wide.`,
      { key: "better", answers: "worse" },
    ),
    said(
      "ada-marsh",
      on(3, 28, 18, 40),
      { sweep: "radials", nearMhz: 52.2 },
      (t) =>
        `For the chase: ${t.dip("radials", 52.2).link} after, ${t.dip("bothCut", 52.2).link} before, so ${khz(t.dip("radials", 52.2).hz - t.dip("bothCut", 52.2).hz)} for three times as many radials. Not the radials either.`,
    ),
    swept({
      key: "screenLow",
      by: "dov-heron",
      at: on(3, 28, 15, 10),
      title: "The screen, 5 to 25 MHz",
      fileName: "screen-5-25.png",
      bytes: pictureOf("screen-5-25"),
    }),
    swept({
      key: "screenHigh",
      by: "dov-heron",
      at: on(3, 28, 15, 14),
      title: "The screen, 46 to 58 MHz",
      fileName: "screen-46-58.png",
      bytes: pictureOf("screen-46-58"),
    }),
    said(
      "dov-heron",
      on(3, 28, 19, 20),
      { sweep: "screenHigh", nearMhz: 52.2 },
      (t) =>
        `I had no stick with me, so here are two pictures of the screen. Read from the pixels, the odd one sits at ${t.dip("screenHigh", 52.2).f}; Ada's file says ${t.dip("radials", 52.2).f}. Good enough to see that it is the same dip, not good enough to trim by.`,
    ),
    changed("cleo-reed", on(3, 29, 12, 20), {
      key: "feedlineOff",
      title: "Feedline taken off at the hub",
      body: "Unscrewed and laid aside, for one sweep; the stake stays in the ground.",
    }),
    swept({
      key: "hub",
      by: "cleo-reed",
      at: on(3, 29, 13, 0),
      title: "At the hub, feedline taken off",
      fileName: "hub-no-feedline.s1p",
      bytes: files.hub,
    }),
    said(
      "cleo-reed",
      on(3, 29, 14, 15),
      { sweep: "hub" },
      (t) =>
        `Laboratory analyser on its battery, calibrated at the hub, feedline unscrewed and laid aside, stake still in the ground. The elements are where they were (${t.dip("hub", 7.12).f}, ${t.dip("hub", 18.2).f}). At 52.3 MHz the return loss is ${t.loss("hub", 52.3)}: **no dip**. With the feedline it was ${t.loss("radials", 52.3)}.`,
      { key: "no-dip" },
    ),
    said(
      "cleo-reed",
      on(3, 29, 14, 25),
      { sweep: "hub", nearMhz: 55.3 },
      (t) => {
        const [first, third] = [t.dip("hub", 18.2), t.dip("hub", 55.3)];
        return `And this is Dov's third resonance of the short element, out in the open at last: 3 × ${first.f} = ${mhz(3 * first.hz)}, found at ${third.link}, ${percent(third.hz / (3 * first.hz))}. It was there all the time, hidden beside the deep one.`;
      },
      { key: "hidden" },
    ),
    said("dov-heron", on(3, 29, 15, 0), { sweep: "hub", nearMhz: 55.3 }, "I accept the consolation prize.", {
      answers: "hidden",
    }),
    said(
      "bram-sedge",
      on(3, 29, 16, 30),
      { sweep: "hub" },
      "Careful. You took away the cable *and* 12 m of loss *and* moved the instrument. That is three changes in one sweep.",
      { key: "three-changes", answers: "no-dip" },
    ),
    said(
      "cleo-reed",
      on(3, 29, 17, 5),
      { sweep: "hub" },
      "Fair. It shows that the dip needs the feedline. It does not show which part of it. So change one length and nothing else.",
      { answers: "three-changes" },
    ),
    changed("bram-sedge", on(4, 3, 16, 50), {
      key: "beads",
      title: "Beads on the cable at the shack",
      body: "The feedline is back on the hub since the 29th.",
      quantities: [counts("Ferrite beads at the shack end", "beads", 0, 5)],
    }),
    swept({
      key: "shackChoke",
      by: "bram-sedge",
      at: on(4, 3, 17, 10),
      title: "Beads on the cable at the shack",
      fileName: "reedbank_0403_beads.tsv",
      bytes: files.shackChoke,
    }),
    said(
      "bram-sedge",
      on(4, 3, 17, 45),
      { sweep: "shackChoke", nearMhz: 52.2 },
      (t) =>
        `Five ferrite beads at the shack end. ${t.dip("shackChoke", 52.2).link}, SWR ${t.dip("shackChoke", 52.2).s}. Same as ever. If the cable were the culprit this should have hurt it.`,
      { key: "beads" },
    ),
    said(
      "dov-heron",
      on(4, 3, 19, 30),
      { sweep: "shackChoke", nearMhz: 52.2 },
      "Only where the current runs. The stretch Ada named ends at the stake, and your beads sit on the other side of it. A choke has to go where the current is: at the hub.",
      { key: "where-it-runs", answers: "beads" },
    ),
    said(
      "ada-marsh",
      on(4, 3, 20, 2),
      { sweep: "shackChoke", nearMhz: 52.2 },
      (t) =>
        `First the length, then the choke. Tomorrow I move the stake to ${FAR_M.toFixed(2)} m from the hub. If it is the braid, we shall find it at ${t.dip("radials", 52.2).f} × ${FREE_M.toFixed(2)} / ${FAR_M.toFixed(2)} = ${mhz((t.dip("radials", 52.2).hz * FREE_M) / FAR_M, 1)}. I write it down before I sweep.`,
      { key: "before-i-sweep", answers: "where-it-runs" },
    ),
    adopted(
      "ada-marsh",
      on(4, 3, 20, 4),
      { sweep: "shackChoke", nearMhz: 52.2 },
      {
        cause: "braid",
        note: () => "Adopted from the list on this page, so that the plan for tomorrow reckons with it.",
      },
    ),
    planned(
      "ada-marsh",
      on(4, 3, 20, 10),
      {
        key: "stakeFar",
        title: `Stake moved out to ${FAR_M.toFixed(2)} m`,
        body: "Only the stake. Where every dip should go is written down here before anybody sweeps.",
        quantities: [makes("braid", "lengthM", "Braid from hub to stake, length", FAR_M)],
      },
      on(4, 4, 10, 0),
    ),
    pictured("ada-marsh", on(4, 3, 20, 20), "stake", STAKE, "stakeFar"),
    done("ada-marsh", on(4, 4, 10, 20), "stakeFar"),
    swept({
      key: "stakeFar",
      by: "cleo-reed",
      at: on(4, 4, 11, 0),
      title: `Stake moved out to ${FAR_M.toFixed(2)} m`,
      fileName: "stake-324.s1p",
      bytes: files.stakeFar,
    }),
    said("ada-marsh", on(4, 4, 12, 10), { sweep: "stakeFar", nearMhz: 44.4 }, (t) => {
      const should = (t.dip("radials", 52.2).hz * FREE_M) / FAR_M;
      const { link, hz, s } = t.dip("stakeFar", 44.4);
      return `${link}, SWR ${s}. Foretold ${mhz(should, 1)}, so ${percent(hz / should)}. The 40 and 17 m dips stayed where they were: ${t.dip("stakeFar", 7.12).f} and ${t.dip("stakeFar", 18.2).f}.`;
    }),
    changed("bram-sedge", on(4, 5, 9, 40), {
      key: "stakeNear",
      title: `Stake moved in to ${NEAR_M.toFixed(2)} m`,
      quantities: [makes("braid", "lengthM", "Braid from hub to stake, length", NEAR_M)],
    }),
    swept({
      key: "stakeNear",
      by: "bram-sedge",
      at: on(4, 5, 10, 20),
      title: `Stake moved in to ${NEAR_M.toFixed(2)} m`,
      fileName: "reedbank_0405a.csv",
      bytes: files.stakeNear,
    }),
    said(
      "bram-sedge",
      on(4, 5, 10, 50),
      { sweep: "stakeNear" },
      `Stake at ${NEAR_M.toFixed(2)} m and it is **gone**. No deep dip left above 40 MHz. Leave the stake there and we are done.`,
      { key: "gone" },
    ),
    said(
      "cleo-reed",
      on(4, 5, 11, 20),
      { sweep: "stakeNear" },
      (t) =>
        `Gone from your sweep, which ends at 60 MHz. The same sum says ${mhz((t.dip("radials", 52.2).hz * FREE_M) / NEAR_M, 1)}. Sweep to 80 before you put the spade away.`,
      { key: "sweep-on", answers: "gone" },
    ),
    swept({
      key: "stakeNearWide",
      by: "bram-sedge",
      at: on(4, 5, 12, 5),
      title: `Stake at ${NEAR_M.toFixed(2)} m, on to 80 MHz`,
      fileName: "reedbank_0405b.csv",
      bytes: files.stakeNearWide,
    }),
    said(
      "bram-sedge",
      on(4, 5, 12, 30),
      { sweep: "stakeNearWide", nearMhz: 62 },
      (t) => `${t.dip("stakeNearWide", 62).link}. I was too quick. It only went out of the picture.`,
      { key: "too-quick" },
    ),
    said(
      "cleo-reed",
      on(4, 5, 14, 40),
      { sweep: "stakeNearWide", nearMhz: 62 },
      (t) => {
        const row = (key: string, nearMhz: number, lengthM: number) => {
          const { f, hz } = t.dip(key, nearMhz);
          return `| ${lengthM.toFixed(2)} m | ${f} | ${((2 * lengthM * hz) / LIGHT_SPEED).toFixed(3)} |`;
        };
        return `Three lengths, three frequencies. If it is a half wave, twice length times frequency is a constant part of the speed of light:

| hub to stake | dip | 2·l·f / c |
|--:|--:|--:|
${row("stakeNearWide", 62, NEAR_M)}
${row("radials", 52.2, FREE_M)}
${row("stakeFar", 44.4, FAR_M)}

Constant within a per cent while the length changes by 40 per cent. I propose it.`;
      },
      { key: "three-lengths" },
    ),
    adopted(
      "cleo-reed",
      on(4, 5, 14, 45),
      { sweep: "stakeNearWide", nearMhz: 62 },
      {
        cause: "braid",
        steps: ["stakeFar", "stakeNear"],
        sweeps: ["hub", "radials", "stakeFar"],
        note: () => "A half wave on the outside of the braid, between the hub and the earth stake.",
      },
    ),
    said(
      "bram-sedge",
      on(4, 5, 15, 10),
      { sweep: "stakeNearWide", nearMhz: 62 },
      "I am convinced about the length. I will be convinced about the outside when a choke takes it away.",
      { answers: "three-lengths" },
    ),
  ];
}

const STAKE =
  "The hub, the stake and the length of cable between them that is meant to change. Drawn, not photographed.";
