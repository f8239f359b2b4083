import { analyse } from "../../../app/measurement/analyse.ts";
import { DEFAULT_SETTINGS, type Sweep } from "../../../app/measurement/sweep.ts";
import { defaultsFor, type PlateChoices } from "../../../app/services/plates/choices.ts";
import { figureOf } from "../../../app/services/plates/figure.ts";
import { LICENCES } from "../../../app/services/plates/licences.ts";
import type { Material, MaterialSweep } from "../../../app/services/plates/material.ts";
import type { PlateRecord } from "../../../app/services/plates/record.ts";
import { tablesOf } from "../../../app/services/plates/tables.ts";

/** An invented plate. */

/** Series resonances on a line of 200 Ω: abs Γ is known in closed form. */
export function sweepOf(resonances: { hz: number; ohm: number; q: number }[], points = 401): Sweep {
  const frequencyHz = Float64Array.from({ length: points }, (_, i) => 1e6 + (i * 29e6) / (points - 1));
  const gammaRe = new Float64Array(points);
  const gammaIm = new Float64Array(points);
  for (let i = 0; i < points; i++) {
    // Admittances of the resonances side by side.
    let [g, b] = [1 / 5000, 0];
    for (const { hz, ohm, q } of resonances) {
      const x = ohm * q * (frequencyHz[i] / hz - hz / frequencyHz[i]);
      g += ohm / (ohm * ohm + x * x);
      b -= x / (ohm * ohm + x * x);
    }
    const [re, im] = [1 - 50 * g, -50 * b];
    const [pre, pim] = [1 + 50 * g, 50 * b];
    const size = pre * pre + pim * pim;
    gammaRe[i] = (re * pre + im * pim) / size;
    gammaIm[i] = (im * pre - re * pim) / size;
  }
  const magnitude = gammaRe.map((re, i) => Math.hypot(re, gammaIm[i]));
  return { frequencyHz, magnitude, gammaRe, gammaIm, referenceOhm: 50, plane: "instrument" };
}

export function materialSweep(id: string, label: string, sweep: Sweep): MaterialSweep {
  const { dips } = analyse(sweep, DEFAULT_SETTINGS);
  return {
    id,
    label,
    caption: "14 Sep 2026",
    points: sweep,
    measured: null,
    swrLimit: 2,
    dips: dips.map((dip, i) => ({ ...dip, id: `${id}-${i}`, label: "", verdict: "" })),
  };
}

export const BANDS: Material["bands"] = [
  { name: "40 m", lowHz: 7e6, highHz: 7.2e6, design: true },
  { name: "20 m", lowHz: 14e6, highHz: 14.35e6, design: false },
  { name: "17 m", lowHz: 18.068e6, highHz: 18.168e6, design: true },
];

export function materialOf(sweeps: MaterialSweep[], more: Partial<Material> = {}): Material {
  return {
    kind: "sweep",
    choices: choicesOf(),
    sweeps,
    focus: null,
    bands: BANDS,
    trails: [],
    steps: [],
    bench: null,
    ...more,
  };
}

export function choicesOf(more: Partial<PlateChoices> = {}): PlateChoices {
  return {
    ...defaultsFor({ title: "Two elements on a reed bank, before the radials were trimmed" }),
    ...more,
  };
}

export function recordOf(material: Material, more: Partial<PlateRecord> = {}): PlateRecord {
  const figure = figureOf(material);
  const { title, caption } = material.choices;
  return {
    format: "swale-plate/1",
    id: "abcdefghjk",
    number: 3,
    version: 1,
    address: "https://swale.example/plates/abcdefghjk",
    previous: null,
    madeAt: "2026-12-01T10:00:00.000Z",
    madeBy: "Ada Marsh",
    kind: material.kind,
    subject: "strip",
    title,
    caption,
    licence: LICENCES[0],
    people: [{ name: "Ada Marsh", part: "added the sweep" }],
    project: { title: "Reed bank vertical", address: "https://swale.example/projects/pppppppppp" },
    figure,
    tables: tablesOf(material.kind, figure),
    sources: material.sweeps.map(({ id, label }) => ({
      role: "sweep",
      sweep: id,
      title: label,
      takenAt: "2026-09-14T17:20:00.000Z",
      name: "reed-bank.s1p",
      sha256: "0".repeat(64),
      sizeBytes: 1234,
      reading: { format: "touchstone", quantity: "gamma", assumed: [], spec: {} },
      settings: { swrLimit: 2, minimumProminenceDb: 3 },
      analysisVersion: "3",
      correction: null,
      bench: null,
    })),
    choices: material.choices,
    code: { version: "0.1.0", analysisVersion: "3" },
    ...more,
  };
}
