import { LIGHT_SPEED } from "./antenna.ts";
import { ZERO_DBM } from "./bridge.ts";
import { changed, pictured } from "./deeds.ts";
import { makes } from "./quantities.ts";
import { AS_BUILT, BOTH_CUT, type reedBankFiles, SHORT_CUT } from "./reed-bank.ts";
import { asBuilt } from "./reed-bank-antenna.ts";
import { decided, said, swept } from "./steps.ts";
import { on, type Step } from "./story.ts";
import { aside, dbm, khz, mhz, percent } from "./told.ts";

/** March: a dip that nobody built, three instruments that agree on it, and a first explanation that fails. */
export function chase(files: ReturnType<typeof reedBankFiles>): Step[] {
  const odd = { sweep: "asBuilt", nearMhz: 52.2 };
  return [
    asBuilt(),
    pictured("ada-marsh", on(3, 6, 19, 5), "reed-bank", REED_BANK),
    said(
      "ada-marsh",
      on(3, 6, 19, 10),
      {},
      `The antenna as it stands tonight, so that we argue about the same thing:

| part | measure |
|:--|--:|
| long element | ${AS_BUILT.longM.toFixed(2)} m |
| short element, 0.4 m beside it, same feedpoint | ${AS_BUILT.shortM.toFixed(2)} m |
| radials, lying on the ground, 7 m each | ${AS_BUILT.radials} |
| feedline to the shack | 12 m |
| free cable between the hub and the earth stake | ${AS_BUILT.braidM?.toFixed(2)} m |

Both elements are cut long on purpose. Please write down what you changed before each sweep, however small.`,
      { key: "as-it-stands" },
    ),
    swept({
      key: "asBuilt",
      by: "bram-sedge",
      at: on(3, 7, 10, 40),
      title: "As built",
      fileName: "reedbank_0307.csv",
      bytes: files.asBuilt,
    }),
    said(
      "bram-sedge",
      on(3, 7, 12, 31),
      odd,
      (
        t,
      ) => `Both elements come out low, ${t.dip("asBuilt", 6.87).link} and ${t.dip("asBuilt", 17.6).link}, which is what cutting long gives.

But the widest good match of the whole sweep is this one: SWR ${t.dip("asBuilt", 52.2).s} and ${t.dip("asBuilt", 52.2).w} wide. Nothing we built is meant to be there. What is it?`,
      { key: "what-is-it" },
    ),
    said(
      "dov-heron",
      on(3, 7, 14, 2),
      odd,
      (t) => {
        const short = t.dip("asBuilt", 17.6).hz;
        return `Three times the short element, I would say. A quarter wave against ground comes back at every odd multiple, and 3 × ${mhz(short)} = ${mhz(3 * short)}. This dip is ${aside(t.dip("asBuilt", 52.2).hz / (3 * short))} that.`;
      },
      { key: "three-times", answers: "what-is-it" },
    ),
    decided("dov-heron", on(3, 7, 14, 5), odd, "propose", (t) => {
      const short = t.dip("asBuilt", 17.6).hz;
      return `Three quarter waves on the short element: 3 × ${mhz(short)} = ${mhz(3 * short)}`;
    }),
    said(
      "cleo-reed",
      on(3, 7, 20, 44),
      odd,
      "Possible, but it lies on the wrong side. The end shortens an element by nearly the same *length* at every multiple, so by a smaller share of each quarter wave: the third resonance usually comes out a little **above** three times the first. This one lies below. I would want to see it move with the element before I believe it.",
      { key: "wrong-side", answers: "three-times" },
    ),
    swept({
      key: "rain",
      by: "bram-sedge",
      at: on(3, 8, 9, 15),
      title: "After a night of rain",
      fileName: "reedbank_0308_rain.csv",
      bytes: files.rain,
    }),
    said("bram-sedge", on(3, 8, 11, 0), { sweep: "rain" }, (t) => {
      const [dry, wet] = [t.dip("asBuilt", 52.2), t.dip("rain", 52.2)];
      return `Rain all night, water standing between the radials, and nothing has moved: ${t.dip("rain", 6.87).f}, ${t.dip("rain", 17.6).f} and ${wet.link}. The odd one is ${khz(wet.hz - dry.hz)} from where it was yesterday, and each of the two is only known to ${dry.pm}. So it is not the mud.`;
    }),
    swept({
      key: "bridge",
      by: "ada-marsh",
      at: on(3, 14, 13, 20),
      title: "With the bridge",
      fileName: "Schilf_Bruecke.txt",
      bytes: files.bridge,
      given: { text: { zeroDb: ZERO_DBM } },
      bench: "bridge",
    }),
    said(
      "ada-marsh",
      on(3, 14, 16, 5),
      { sweep: "bridge" },
      `Spectrum analyser with tracking generator at 0 dBm, bridge, ten minutes of warming up. With the port open the level is ${dbm(ZERO_DBM)}; a resistive 50 Ω bridge with a 50 Ω source and detector loses 12.04 dB from the source to the detector when the port is open or shorted, so that is a sane bridge. It was chosen as this sweep's bench, so its own open, short and load are in the numbers and in their limits. The pocket analyser has none of the three: of its numbers only the noise is known.`,
      { key: "zero-line" },
    ),
    said(
      "bram-sedge",
      on(3, 14, 17, 50),
      { sweep: "bridge" },
      (t) =>
        `Then my pocket analyser is not to blame. ${t.dip("bridge", 52.2).link} with the bridge against ${t.dip("asBuilt", 52.2).link} with mine, SWR ${t.dip("bridge", 52.2).s} against ${t.dip("asBuilt", 52.2).s}.`,
      { answers: "zero-line" },
    ),
    swept({
      key: "laboratory",
      by: "cleo-reed",
      at: on(3, 15, 14, 0),
      title: "With the laboratory's analyser, in the shack",
      fileName: "reed-bank-shack.s1p",
      bytes: files.laboratory,
    }),
    said(
      "cleo-reed",
      on(3, 15, 18, 20),
      { sweep: "laboratory", nearMhz: 52.2 },
      (
        t,
      ) => `Borrowed until the 20th of April, calibrated at the end of its own test lead. Three instruments, the same antenna:

| | odd dip | SWR | 2:1 width |
|:--|--:|--:|--:|
| pocket analyser | ${t.dip("asBuilt", 52.2).f} | ${t.dip("asBuilt", 52.2).s} | ${t.dip("asBuilt", 52.2).w} |
| bridge | ${t.dip("bridge", 52.2).f} | ${t.dip("bridge", 52.2).s} | ${t.dip("bridge", 52.2).w} |
| laboratory | ${t.dip("laboratory", 52.2).f} | ${t.dip("laboratory", 52.2).s} | ${t.dip("laboratory", 52.2).w} |

It is real. One warning: this sweep has phase, but there are 12 m of cable in it, which turn the phase round many times. Do not read a resistance off it as if it were the antenna's.`,
      { key: "three-instruments" },
    ),
    said(
      "dov-heron",
      on(3, 15, 19, 2),
      { sweep: "laboratory", nearMhz: 52.2 },
      "Agreed, it is real. And the loss of the cable flatters all three alike, more so at 52 MHz than at 7.",
      { answers: "three-instruments" },
    ),
    changed("bram-sedge", on(3, 21, 9, 50), {
      key: "shortCut",
      title: `Short element cut to ${SHORT_CUT.shortM.toFixed(2)} m`,
      body: "At the top, mast laid down for it.",
      quantities: [makes("short", "lengthM", "Short element, length", SHORT_CUT.shortM)],
    }),
    swept({
      key: "shortCut",
      by: "bram-sedge",
      at: on(3, 21, 10, 30),
      title: "Short element cut to 4.00 m",
      fileName: "reedbank_0321a.csv",
      bytes: files.shortCut,
    }),
    said("bram-sedge", on(3, 21, 11, 15), { sweep: "shortCut", nearMhz: 18.2 }, (t) => {
      const [before, after] = [t.dip("asBuilt", 17.6), t.dip("shortCut", 18.2)];
      return `Saw out. ${AS_BUILT.shortM.toFixed(2)} m to ${SHORT_CUT.shortM.toFixed(2)} m is ${percent(AS_BUILT.shortM / SHORT_CUT.shortM)} in frequency if it goes as one over the length. It went from ${before.link} to ${after.link}: ${percent(after.hz / before.hz)}. That one obeys.`;
    }),
    said(
      "bram-sedge",
      on(3, 21, 11, 40),
      { sweep: "shortCut", nearMhz: 52.2 },
      (t) => {
        const [before, after] = [t.dip("asBuilt", 52.2), t.dip("shortCut", 52.2)];
        const should = 3 * (t.dip("shortCut", 18.2).hz - t.dip("asBuilt", 17.6).hz);
        return `Your turn, Dov. Three times the short element should have gone up by ${mhz(should)}. It went from ${before.link} to ${after.f}, which is ${khz(after.hz - before.hz)}.`;
      },
      { key: "your-turn" },
    ),
    said(
      "dov-heron",
      on(3, 21, 13, 5),
      { sweep: "shortCut", nearMhz: 52.2 },
      (t) =>
        `I withdraw it. What little it did move is more than the uncertainty (${t.dip("shortCut", 52.2).pm}), so the short element's real third resonance probably lies next door and pulls a bit. But it is a neighbour and not the cause.`,
      { key: "withdrawn", answers: "your-turn" },
    ),
    decided(
      "ada-marsh",
      on(3, 21, 13, 30),
      odd,
      "reopen",
      "It did not move with the short element, so it is not its third resonance",
    ),
    changed("bram-sedge", on(3, 21, 14, 30), {
      key: "bothCut",
      title: `Long element cut to ${BOTH_CUT.longM.toFixed(2)} m`,
      quantities: [makes("long", "lengthM", "Long element, length", BOTH_CUT.longM)],
    }),
    swept({
      key: "bothCut",
      by: "bram-sedge",
      at: on(3, 21, 15, 10),
      title: "Long element cut to 10.24 m",
      fileName: "reedbank_0321b.txt",
      bytes: files.bothCut,
    }),
    said("bram-sedge", on(3, 21, 15, 55), { sweep: "bothCut", nearMhz: 7.12 }, (t) => {
      const [before, after] = [t.dip("shortCut", 6.87), t.dip("bothCut", 7.12)];
      const should = (before.hz * AS_BUILT.longM) / BOTH_CUT.longM;
      return `${AS_BUILT.longM.toFixed(2)} m × ${before.f} / ${BOTH_CUT.longM.toFixed(2)} m = ${mhz(should, 3)} on paper, ${after.link} on the reed bank. I am keeping the saw. (This file is R and X in kHz, the other analyser was out of battery.)`;
    }),
    decided(
      "bram-sedge",
      on(3, 21, 16, 0),
      { sweep: "bothCut", nearMhz: 7.12 },
      "settle",
      "Long element, quarter wave; moved with its length as it should",
    ),
    decided(
      "bram-sedge",
      on(3, 21, 16, 2),
      { sweep: "bothCut", nearMhz: 18.2 },
      "settle",
      "Short element, quarter wave; moved with its length as it should",
    ),
    said("dov-heron", on(3, 21, 18, 12), { sweep: "bothCut", nearMhz: 21.5 }, (t) => {
      const [first, third] = [t.dip("bothCut", 7.12), t.dip("bothCut", 21.5)];
      return `Here is what I was looking for at 52, only on the long element: 3 × ${first.f} = ${mhz(3 * first.hz)}, found at ${third.link}, ${percent(third.hz / (3 * first.hz))}. Above, as Cleo said. It moved when Bram cut, too.`;
    }),
    decided(
      "dov-heron",
      on(3, 21, 18, 15),
      { sweep: "bothCut", nearMhz: 21.5 },
      "propose",
      "Long element, three quarter waves",
    ),
    swept({
      key: "closeLook",
      by: "cleo-reed",
      at: on(3, 22, 11, 0),
      title: "A close look, 46 to 58 MHz",
      fileName: "odd-dip-close.s1p",
      bytes: files.closeLook,
    }),
    said(
      "cleo-reed",
      on(3, 22, 12, 25),
      { sweep: "closeLook", nearMhz: 52.2 },
      (t) => {
        const { f, hz, pm } = t.dip("closeLook", 52.2);
        const half = LIGHT_SPEED / (2 * hz);
        return `${f}, ${pm}. So forget the elements and ask what here is half a wave long at that frequency: ${half.toFixed(2)} m in free space, about ${(0.96 * half).toFixed(2)} m for a conductor of some thickness near the ground. Does anybody know anything of that length?`;
      },
      { key: "half-a-wave" },
    ),
    said(
      "ada-marsh",
      on(3, 22, 13, 1),
      { sweep: "closeLook", nearMhz: 52.2 },
      `Yes, and I wrote it into the table on the first evening: ${AS_BUILT.braidM?.toFixed(2)} m of free cable between the hub and the earth stake. The braid is tied to the radials at one end and to the stake at the other.`,
      { key: "the-cable", answers: "half-a-wave" },
    ),
    said(
      "bram-sedge",
      on(3, 22, 13, 9),
      { sweep: "closeLook", nearMhz: 52.2 },
      "A coaxial cable is not an antenna, that is the point of it.",
      { key: "not-an-antenna", answers: "the-cable" },
    ),
    said(
      "dov-heron",
      on(3, 22, 13, 30),
      { sweep: "closeLook", nearMhz: 52.2 },
      "Its inside is not. The outside of the braid is a conductor like any other, and at the hub nothing keeps the current from choosing it as a ninth radial that happens to go up the bank.",
      { answers: "not-an-antenna" },
    ),
  ];
}

const REED_BANK =
  "Both elements on the hub, radials around it, the cable over the stake up the bank. Drawn, not photographed: the place is invented.";
