import type { Antenna, AntennaElement } from "~/measurement/antenna";
import { described, planned } from "./deeds.ts";
import { makes } from "./quantities.ts";
import { AS_BUILT, FEEDLINE } from "./reed-bank.ts";
import { on, type Step } from "./story.ts";

/** What the circle says of its antenna, for the pages that reckon with it. Keys are what steps point at. */
export function asBuilt(): Step {
  return described("ada-marsh", on(3, 6, 19, 0), "As it was put up", () => AS_DESCRIBED);
}

/** What the numbers can't say. */
export function chokeDescribed(): Step {
  return described("ada-marsh", on(4, 11, 14, 0), "Where the choke sits", (antenna) => ({
    ...antenna,
    choke: { turns: antenna.choke?.turns ?? null, core: "Ferrite ring, 61 mm", where: "Right at the hub" },
  }));
}

/** What is still to be tried, and waits for a sweep. */
export function oneMoreCut(): Step {
  return planned(
    "bram-sedge",
    on(4, 20, 19, 0),
    {
      key: "oneMoreCut",
      title: "Long element to 10.20 m, and nothing else",
      body: "Cleo wants one length changed and nothing beside it. If the dip near 36 MHz is the long element's fifth, it goes up with the first and the third; the short element's stay.",
      quantities: [makes("long", "lengthM", "Long element, length", 10.2)],
    },
    on(4, 25, 10, 0),
  );
}

function element(
  key: string,
  kind: AntennaElement["kind"],
  name: string,
  lengthM: number | null,
  more: Partial<AntennaElement>,
): AntennaElement {
  const unsaid = { count: 1, heightM: null, diameterMm: null, material: "", insulated: null, where: "" };
  return { key, kind, name, lengthM, ...unsaid, ...more };
}

const TUBE = { heightM: 0, diameterMm: 16, material: "aluminium tube", insulated: false };

const AS_DESCRIBED: Antenna = {
  elements: [
    element("long", "vertical", "Long element", AS_BUILT.longM, { ...TUBE, where: "on the hub, upright" }),
    element("short", "vertical", "Short element", AS_BUILT.shortM, {
      ...TUBE,
      where: "0.4 m beside the long one, same feedpoint",
    }),
    element("radials", "radial", "Radials", 7, {
      count: AS_BUILT.radials,
      heightM: 0,
      diameterMm: 1.5,
      material: "copper",
      insulated: true,
      where: "lying on the ground, all around the hub",
    }),
    element("braid", "wire", "Braid from hub to stake", AS_BUILT.braidM, {
      heightM: 0.1,
      diameterMm: 7,
      material: "copper",
      where: "the outside of the feedline, between the hub and the earth stake",
    }),
    element("fence", "wire", "Fence along the path", null, {
      material: "steel",
      where: "12 m off; nobody has measured it yet",
    }),
  ],
  feedline: {
    cable: null,
    lengthM: FEEDLINE.lengthM,
    velocityFactor: FEEDLINE.velocityFactor,
    route: "from the hub past the stake up the bank to the shack",
  },
  choke: null,
  ground: "Wet peat, reeds cut back to 8 m around the hub",
  remarks: "",
};
