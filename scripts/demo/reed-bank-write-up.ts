import * as projects from "~/db/projects.server";
import * as writeUps from "~/db/write-ups.server";
import { makeDraft } from "~/services/write-ups/drafts.server";
import { publish, revisionOf } from "~/services/write-ups/publish.server";
import { deed } from "./deeds.ts";
import { idOf, type Stage } from "./stage.ts";
import { on, type Step } from "./story.ts";

/** What the circle's newsletter prints: short, with two plates and a figure drawn for it. */
export function writeUp(): Step[] {
  return [
    deed("ada-marsh", on(4, 20, 19, 30), async (stage, by) => {
      const { project, told } = stage;
      const found = await projects.findWithRole(project.publicId, by.id);
      if (!found) throw new Error("The demo's project is gone.");
      const draft = { title: "The dip that nobody built", body: textOf(stage) };
      const publicId = await makeDraft(project, by, draft, on(4, 19, 20));
      const row = await writeUps.findByPublicId(publicId);
      if (!row) throw new Error("The demo's write-up is gone.");
      const revision = revisionOf(row.writeUp);
      const at = on(4, 20, 19, 30);
      const made = await publish(row.writeUp, found.project, by, { revision, remark: "", at });
      if (made.kind !== "published")
        throw new Error(`The demo's write-up: ${made.kind} (${told.known("final").title}).`);
    }),
  ];
}

function textOf({ told, plateIds }: Stage): string {
  const plate = (key: string) => `#plate:${idOf(plateIds, key, "plate")}`;
  const dip = told.dip("radials", 52.2);
  const { publicId } = told.found("radials", 52.2);
  return `Our vertical on the reed bank was meant for 40 and 17 metres, and does both. From the first sweep on it also did something that nobody had built: a dip near 52 MHz, deeper than either of the wanted ones. It took us many weekends to find out what it was. Everything in this is invented, the club included[^model].

## What was seen

At its deepest the dip lay at ${dip.f} (${dip.pm}) with an SWR of ${dip.s}.

![The dip that nobody built, near enough to see its shape](#dip:${publicId})

An element was the first guess, and the wrong one: no element has a length that fits, and trimming both moved the wanted dips and left this one where it was.

## What moved it

What did move it was the stake that the feedline's braid is tied to. The braid between hub and stake is half a wave long at the dip, so

$$
f \\approx k\\,\\frac{c}{2\\,\\ell}
$$

with $\\ell$ the length of braid. Three lengths, three frequencies, one line:

![One dip, followed while the stake was moved](${plate("braid-mended")})

## What ended it

Twelve turns of the feedline through a ferrite ring, right at the hub[^ring]. The dip is gone; the wanted ones stay.

![Before and after the choke](${plate("before-and-after")})

What the choke does to noise that the cable picks up, these sweeps cannot say.

## Try it

1. Sweep far beyond the bands that you built for.
2. Change one thing at a time, and write down what.
3. Hang a choke on before you cut anything.

A dip outside the bands is a finding, not a permission to transmit there.

[^model]: The numbers come from a small model of two elements over radials; what is concluded is what such measurements do show.
[^ring]: At the feed point, not at the far end of the cable: the current has to be stopped where it begins.`;
}
