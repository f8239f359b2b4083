import type { Definition } from "../definition";
import { bands } from "./bands";
import { bandwidth } from "./bandwidth";
import { causes } from "./causes";
import { dip } from "./dip";
import { directivity } from "./directivity";
import { elements } from "./elements";
import { feedline } from "./feedline";
import { impedance } from "./impedance";
import { knownSwr } from "./known-swr";
import { lNetwork } from "./l-network";
import { lowestSwr } from "./lowest-swr";
import { mismatchLoss } from "./mismatch-loss";
import { noise } from "./noise";
import { otherReference } from "./other-reference";
import { q } from "./q";
import { qSlope } from "./q-slope";
import { repeats } from "./repeats";
import { resonance } from "./resonance";
import { returnLoss } from "./return-loss";
import { side } from "./side";
import { swr } from "./swr";
import { threeTerm } from "./three-term";
import { tooFewPoints } from "./too-few-points";
import { trails } from "./trails";
import { trim } from "./trim";
import { uncertainty } from "./uncertainty";
import { zeroLine } from "./zero-line";

/** All definitions, in the order of reading. */
export const CHAPTERS: readonly { title: string; definitions: readonly Definition[] }[] = [
  { title: "Quantities", definitions: [returnLoss, swr, mismatchLoss, otherReference] },
  { title: "Dips", definitions: [dip, lowestSwr, bandwidth, q, tooFewPoints] },
  { title: "How well it is known", definitions: [noise, uncertainty, repeats, directivity, knownSwr] },
  { title: "Bench and feedline", definitions: [zeroLine, threeTerm, feedline] },
  { title: "With phase", definitions: [impedance, resonance, qSlope, side, lNetwork] },
  { title: "Why a dip is there, and what to do", definitions: [bands, elements, causes, trails, trim] },
];
