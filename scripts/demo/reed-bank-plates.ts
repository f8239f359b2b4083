import * as trails from "~/db/trails.server";
import { plated } from "./plated.ts";
import type { Stage } from "./stage.ts";
import { on, type Step } from "./story.ts";

/** What the circle takes to its newsletter: three plates, one of them mended. */
export function plates(): Step[] {
  return [
    plated("ada-marsh", on(4, 19, 9, 0), {
      key: "before-and-after",
      of: ({ told }) => `compare:${told.known("radials").publicId},${told.known("choked").publicId}`,
      chosen: {
        title: "With the braid free, and choked at the hub",
        caption:
          "The deep dip at 52 MHz is gone with twelve turns on a ferrite ring at the hub, and the two wanted dips stay where they were. Invented, as everything of the *Fennmarsh Antenna Circle*.",
      },
    }),
    plated("ada-marsh", on(4, 19, 9, 20), {
      key: "braid",
      of: trailOfBraid,
      chosen: {
        title: "The braid’s half wave, followed through March and April",
        caption:
          "One dip, which moved with the length of braid between hub and mast. Its frequency times the length stays nearly the same.",
      },
    }),
    plated("ada-marsh", on(4, 19, 18, 5), {
      key: "braid-mended",
      of: trailOfBraid,
      mends: {
        key: "braid",
        reason: "The caption said “hub and mast”: the braid runs from the hub to the stake.",
      },
      chosen: {
        title: "The braid’s half wave, followed through March and April",
        caption:
          "One dip, which moved with the length of braid between hub and stake. Its frequency times the length stays nearly the same.",
      },
    }),
    plated("cleo-reed", on(4, 19, 19, 0), {
      key: "as-it-stays",
      of: ({ told }) => `sweep:${told.known("final").publicId}`,
      chosen: {
        title: "The vertical on the reed bank as it stays",
        caption: "At the antenna: the 12 m of feedline are taken out. 40 and 17 metres lie inside SWR 2.",
      },
    }),
  ];
}

async function trailOfBraid({ told }: Stage): Promise<string> {
  const trail = await trails.findByDip(told.found("radials", 52.2).id);
  if (!trail) throw new Error("The demo's dip of the braid is on no trail.");
  return `trail:${trail.publicId}`;
}
