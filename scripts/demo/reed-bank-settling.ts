import { atTheAntenna, changed, followed, pictured, repeated } from "./deeds.ts";
import { makes } from "./quantities.ts";
import { AS_BUILT, FEEDLINE, type reedBankFiles } from "./reed-bank.ts";
import { chokeDescribed, oneMoreCut } from "./reed-bank-antenna.ts";
import { decided, said, swept } from "./steps.ts";
import { on, type Step } from "./story.ts";
import { aside, mhz } from "./told.ts";

/** April: a choke at the hub, and what is settled and kept. */
export function settling(files: ReturnType<typeof reedBankFiles>): Step[] {
  return [
    changed("ada-marsh", on(4, 11, 13, 50), {
      key: "choked",
      title: "Choke at the hub, stake back at 2.76 m",
      body: "Twelve turns of the feedline through a ferrite ring.",
      quantities: [
        makes("choke", "turns", "Choke, turns", 12),
        makes("braid", "lengthM", "Braid from hub to stake, length", AS_BUILT.braidM ?? 0),
      ],
    }),
    chokeDescribed(),
    pictured("ada-marsh", on(4, 11, 14, 10), "choke", CHOKE, "choked"),
    swept({
      key: "choked",
      by: "ada-marsh",
      at: on(4, 11, 15, 0),
      title: "Choke at the hub, stake back at 2.76 m",
      fileName: "Schilf_Drossel.txt",
      bytes: files.choked,
      bench: "bridge",
    }),
    said(
      "ada-marsh",
      on(4, 11, 16, 40),
      { sweep: "choked" },
      (
        t,
      ) => `Twelve turns of the feedline on a ferrite core, right at the hub, and the stake back where it began. Swept to 80 MHz so that nobody can say it left the picture. Return loss at the three places where it has been:

| | with the dip there | choked |
|:--|--:|--:|
| 44.4 MHz | ${t.loss("stakeFar", 44.37)} | ${t.loss("choked", 44.37)} |
| 52.3 MHz | ${t.loss("radials", 52.26)} | ${t.loss("choked", 52.26)} |
| 62.0 MHz | ${t.loss("stakeNearWide", 62)} | ${t.loss("choked", 62)} |

All that is left up there is the short element's third resonance, ${t.dip("choked", 55.3).link}, SWR ${t.dip("choked", 55.3).s}.`,
      { key: "choked" },
    ),
    said("bram-sedge", on(4, 11, 17, 0), { sweep: "choked" }, "Convinced.", { answers: "choked" }),
    said(
      "dov-heron",
      on(4, 11, 19, 15),
      { sweep: "choked" },
      (t) =>
        `Worth saying what it did *not* do: 40 m ${t.dip("radials", 7.12).f} before and ${t.dip("choked", 7.12).f} after, 17 m ${t.dip("radials", 18.2).f} and ${t.dip("choked", 18.2).f}. At those frequencies the braid is too far from half a wave to take much part. What the choke does to noise picked up on the cable these sweeps cannot say.`,
      { answers: "choked" },
    ),
    ...settled(),
    ...again(files),
    swept({
      key: "final",
      by: "cleo-reed",
      at: on(4, 18, 10, 0),
      title: "As it stays",
      fileName: "reed-bank-final.s1p",
      bytes: files.final,
    }),
    atTheAntenna("cleo-reed", on(4, 18, 11, 0), "final", { name: "own values", ...FEEDLINE }),
    said(
      "cleo-reed",
      on(4, 18, 11, 30),
      { sweep: "final" },
      (
        t,
      ) => `For the record, 1 to 80 MHz. It has phase, so the 12 m of feedline are taken out again: this is the antenna itself, where the cable flatters nothing. SWR at the edges and in the middle of what we wanted:

| | low edge | middle | high edge |
|:--|--:|--:|--:|
| 40 m | ${t.swrAt("final", 7)} | ${t.swrAt("final", 7.1)} | ${t.swrAt("final", 7.2)} |
| 17 m | ${t.swrAt("final", 18.068)} | ${t.swrAt("final", 18.118)} | ${t.swrAt("final", 18.168)} |

Both inside the limit of 2 everywhere. Three sweeps of 5 to 25 MHz, one right after the other, show how well such numbers repeat.`,
    ),
    ...asItStays(),
    said(
      "ada-marsh",
      on(4, 18, 20, 30),
      {},
      `Six weeks for one dip. What I take along:

1. A dip that does not move with an element does not belong to it, however well the multiples fit.
2. Change one thing, write the expected frequency down, then sweep.
3. A dip that leaves the sweep is not gone.
4. The good match at 52 MHz was never a permission to use it, and with the choke it is not even a match.

The stake stays, for lightning. Nobody works at the mast when there is thunder about.`,
      { key: "what-i-take" },
    ),
    said(
      "dov-heron",
      on(4, 18, 21, 4),
      {},
      "5. Believe Cleo about which side of three times it ought to lie.",
      { answers: "what-i-take" },
    ),
    oneMoreCut(),
  ];
}

/** What is left in the last sweep: three explained, one proposed, one open. */
function asItStays(): Step[] {
  const settle = (nearMhz: number, name: string, settled: string, minute: number) =>
    followed("ada-marsh", on(4, 18, 12, minute), { sweep: "final", nearMhz }, { name, settled });
  return [
    settle(7.12, "Long element", "Quarter wave: moved with its length", 10),
    settle(18.16, "Short element", "Quarter wave: moved with its length", 11),
    settle(21.5, "Long element, third", "Three quarter waves: moved with the first", 12),
    decided(
      "dov-heron",
      on(4, 18, 13, 30),
      { sweep: "final", nearMhz: 55.3 },
      "propose",
      "Short element, three quarter waves",
    ),
    said(
      "bram-sedge",
      on(4, 18, 14, 20),
      { sweep: "final", nearMhz: 36.2 },
      (t) => {
        const [first, fifth] = [t.dip("final", 7.12), t.dip("final", 36.2)];
        return `If we are sorting the rest: is this five quarter waves on the long one? 5 × ${first.f} = ${mhz(5 * first.hz)}, found at ${fifth.link}, ${aside(fifth.hz / (5 * first.hz))}. On the right side this time.`;
      },
      { key: "five-quarters" },
    ),
    said(
      "cleo-reed",
      on(4, 18, 15, 2),
      { sweep: "final", nearMhz: 36.2 },
      "On the right side, and it moved when you cut. Somebody should still change one length and nothing else before we call it settled.",
      { answers: "five-quarters" },
    ),
  ];
}

/** Another person's word on Cleo's proposal; and for its whole trail, which the stake had torn into three. */
function settled(): Step[] {
  const at = (sweep: string, nearMhz: number) => ({ sweep, nearMhz });
  const last = at("stakeNearWide", 62);
  return [
    decided("ada-marsh", on(4, 12, 10, 10), last, "settle", SETTLED, {
      steps: ["stakeFar", "stakeNear", "choked"],
      sweeps: ["hub", "choked"],
      notes: ["three-lengths"],
    }),
    followed("ada-marsh", on(4, 12, 10, 20), at("radials", 52.2), {
      name: "The braid's half wave",
      // Without the feedline the short element's third was all that was left, and the pairing went on with it.
      apart: [[at("screenHigh", 52.2), at("hub", 55.3)]],
      others: [at("shackChoke", 52.2), at("stakeFar", 44.4), last],
      settled: SETTLED,
    }),
  ];
}

/** Three sweeps of one thing, a minute apart. */
function again(files: ReturnType<typeof reedBankFiles>): Step[] {
  const keys = ["againOne", "againTwo", "againThree"] as const;
  return [
    ...keys.map((key, i) =>
      swept({
        key,
        by: "cleo-reed",
        at: on(4, 18, 9, 30 + i),
        title: `As it stays, 5 to 25 MHz, ${["once", "twice", "three times"][i]}`,
        fileName: `reed-bank-repeat-${i + 1}.s1p`,
        bytes: files[key],
      }),
    ),
    repeated("cleo-reed", on(4, 18, 9, 50), [...keys]),
  ];
}

const SETTLED =
  "Half wave on the outside of the braid between hub and stake: moved with that length, gone with a choke at the hub";
const CHOKE =
  "Twelve turns of the feedline through a ferrite ring, right at the hub. Drawn, not photographed.";
