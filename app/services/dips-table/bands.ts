import { type Band, bandsOverlapping, type ItuRegion } from "../../measurement/bands.ts";

/** Which band a dip of a table lies in, and the stretches that a choice of bands stands for. Pure. */

export interface Stretch {
  name: string;
  lowHz: number;
  highHz: number;
}

export interface ProjectBands {
  design: readonly Stretch[];
  allocations: readonly Band[];
}

export interface BandOfDip {
  /** Null: in no band at all. */
  name: string | null;
  /** In a band that the antenna was designed for. */
  design: boolean;
}

export function projectBands(region: number | null, design: readonly Stretch[]): ProjectBands {
  return {
    design,
    allocations: bandsOverlapping(region as ItuRegion | null, 0, Number.POSITIVE_INFINITY),
  };
}

export function bandOf(hz: number, { design, allocations }: ProjectBands): BandOfDip {
  const holds = ({ lowHz, highHz }: { lowHz: number; highHz: number }) => hz >= lowHz && hz <= highHz;
  const own = design.find(holds);
  if (own) return { name: own.name, design: true };
  return { name: allocations.find(holds)?.name ?? null, design: false };
}

/** What can be chosen: the three choices about all bands, then every band by name, those designed for first. */
export function bandChoices({ design, allocations }: ProjectBands): { value: string; label: string }[] {
  const names = [...new Set([...design, ...allocations].map(({ name }) => name))];
  return [
    { value: "", label: "Anywhere" },
    ...(design.length > 0
      ? [
          { value: IN_DESIGN, label: "In a design band" },
          { value: OUT_OF_DESIGN, label: "Outside the design bands" },
        ]
      : []),
    { value: OUTSIDE, label: "Outside every band" },
    ...names.map((name) => ({ value: `in:${name}`, label: name })),
  ];
}

/** The stretches of a choice; null for anywhere, and for what is no choice. A name that both have is the design band's. */
export function stretchesOf(choice: string, { design, allocations }: ProjectBands) {
  if (choice === IN_DESIGN) return { inside: true, of: design };
  if (choice === OUT_OF_DESIGN) return { inside: false, of: design };
  if (choice === OUTSIDE) return { inside: false, of: [...design, ...allocations] };
  const named = (bands: readonly { name: string; lowHz: number; highHz: number }[]) =>
    bands.filter(({ name }) => choice === `in:${name}`);
  const of = named(design).length > 0 ? named(design) : named(allocations);
  return of.length > 0 ? { inside: true, of } : null;
}

const IN_DESIGN = "design";
const OUT_OF_DESIGN = "not-design";
const OUTSIDE = "outside";
