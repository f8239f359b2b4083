import { reedBankFiles } from "./reed-bank.ts";
import { chase } from "./reed-bank-chase.ts";
import { plates } from "./reed-bank-plates.ts";
import { proof } from "./reed-bank-proof.ts";
import { settling } from "./reed-bank-settling.ts";
import { writeUp } from "./reed-bank-write-up.ts";
import type { Story } from "./story.ts";

export function reedBankStory(): Story {
  const files = reedBankFiles();
  return {
    title: "The vertical on the reed bank",
    summary: `Two elements side by side over radials on a reed bank, meant for **40 and 17 metres**. From the first sweep on there was one deep dip far above both, which nobody had built. This is how the *Fennmarsh Antenna Circle* found out what it was.

All of it is invented: the club, its people, the place and every number, which a small model made. What the people conclude is what such measurements do show.`,
    visibility: "public",
    owner: "ada-marsh",
    members: [
      { who: "bram-sedge", role: "experimenter" },
      { who: "cleo-reed", role: "experimenter" },
      { who: "dov-heron", role: "commenter" },
    ],
    bands: [
      { name: "40 m", lowHz: 7e6, highHz: 7.2e6, swrLimit: 2 },
      { name: "17 m", lowHz: 18.068e6, highHz: 18.168e6, swrLimit: 2 },
    ],
    steps: [...chase(files), ...proof(files), ...settling(files), ...plates(), ...writeUp()],
  };
}
