import type { reedBankFiles } from "./reed-bank.ts";
import { decided, said, swept } from "./steps.ts";
import { on, type Step } from "./story.ts";
import { aside, mhz } from "./told.ts";

/** April: a choke at the hub, and what is settled and kept. */
export function settling(files: ReturnType<typeof reedBankFiles>): Step[] {
  return [
    swept({
      key: "choked",
      by: "ada-marsh",
      at: on(4, 11, 15, 0),
      title: "Choke at the hub, stake back at 2.76 m",
      fileName: "Schilf_Drossel.txt",
      bytes: files.choked,
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
    swept({
      key: "final",
      by: "cleo-reed",
      at: on(4, 18, 10, 0),
      title: "As it stays",
      fileName: "reed-bank-final.s1p",
      bytes: files.final,
    }),
    said(
      "cleo-reed",
      on(4, 18, 11, 30),
      { sweep: "final" },
      (
        t,
      ) => `For the record, from the shack, 1 to 80 MHz. SWR at the edges and in the middle of what we wanted:

| | low edge | middle | high edge |
|:--|--:|--:|--:|
| 40 m | ${t.swrAt("final", 7)} | ${t.swrAt("final", 7.1)} | ${t.swrAt("final", 7.2)} |
| 17 m | ${t.swrAt("final", 18.068)} | ${t.swrAt("final", 18.118)} | ${t.swrAt("final", 18.168)} |

Both inside the limit of 2 everywhere.`,
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
  ];
}

/** What is left in the last sweep: three explained, one proposed, one open. */
function asItStays(): Step[] {
  const settle = (nearMhz: number, text: string, minute: number) =>
    decided("ada-marsh", on(4, 18, 12, minute), { sweep: "final", nearMhz }, "settle", text);
  return [
    settle(7.12, "Long element, quarter wave", 10),
    settle(18.16, "Short element, quarter wave", 11),
    settle(21.5, "Long element, three quarter waves", 12),
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

/** The verdict, on each sweep in which the dip stood out. */
function settled(): Step[] {
  const where = [
    ["asBuilt", 52.2],
    ["bothCut", 52.2],
    ["radials", 52.2],
    ["stakeFar", 44.4],
    ["stakeNearWide", 62],
  ] as const;
  return where.map(([sweep, nearMhz], i) =>
    decided(
      "ada-marsh",
      on(4, 12, 10, 10 + i),
      { sweep, nearMhz },
      "settle",
      "Half wave on the outside of the braid between hub and stake: moved with that length, gone with a choke at the hub",
    ),
  );
}
