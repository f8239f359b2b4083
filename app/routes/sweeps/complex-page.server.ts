import { packComplex } from "~/charts/sent-complex";
import { evenSteps } from "~/measurement/complex/even-steps";
import { gammaAt } from "~/measurement/complex/gamma-at";
import { complexNoise } from "~/measurement/complex/impedance";
import { lNetworks, singleElements } from "~/measurement/complex/l-network";
import { unwrappedPhaseDeg } from "~/measurement/complex/phase";
import { nearestZero, reactanceZeros } from "~/measurement/complex/reactance-zeros";
import { sideAt } from "~/measurement/complex/side";
import { slopeQ } from "~/measurement/complex/slope-q";
import { decimate } from "~/measurement/decimate";
import { type Complex, gammaToImpedance } from "~/measurement/reflection";
import type { Sweep } from "~/measurement/sweep";
import { parseFrequency } from "~/measurement/units";

interface AskedDip {
  publicId: string | null;
  frequencyHz: number;
  returnLossDb: number;
  edge: boolean;
}

interface Range {
  fromHz: number;
  toHz: number;
}

/**
 * What phase adds to a sweep's page: the plane of Γ, impedance, resonances, Q by slope and matching networks. Null for a scalar
 * sweep. `sweep` with all its points, as noise and slopes need them; `at` is what stands in the address as `match`, Hz or with its unit;
 * `range` the stretch in view, the whole sweep when left out.
 */
export function loadComplex(
  sweep: Sweep,
  dips: readonly AskedDip[],
  at: string | null = null,
  range: Range | null = null,
) {
  const phase = unwrappedPhaseDeg(sweep);
  const n = sweep.frequencyHz.length;
  if (!sweep.gammaRe || !sweep.gammaIm || !phase || n === 0) return null;
  const shown = range ?? { fromHz: sweep.frequencyHz[0], toHz: sweep.frequencyHz[n - 1] };
  const indices = drawnPoints(sweep, shown);
  const pick = (column: Float64Array) => Float64Array.from(indices, (i) => column[i]);
  // Takes as long as all the rest, so it is told once for all of them.
  const noise = complexNoise(sweep);
  const zeros = reactanceZeros(sweep, noise);
  const inView = dips.filter(({ frequencyHz }) => frequencyHz >= shown.fromHz && frequencyHz <= shown.toHz);
  const zerosInView = zeros.filter(
    ({ frequencyHz }) => frequencyHz >= shown.fromHz && frequencyHz <= shown.toHz,
  );
  return {
    referenceOhm: sweep.referenceOhm,
    plane: sweep.plane,
    range: shown,
    points: packComplex({
      frequencyHz: pick(sweep.frequencyHz),
      re: pick(sweep.gammaRe),
      im: pick(sweep.gammaIm),
      phaseDeg: pick(phase),
    }),
    zeros: zerosInView.slice(0, MOST_ROWS),
    moreZeros: Math.max(0, zerosInView.length - MOST_ROWS),
    dips: inView.slice(0, MOST_ROWS).map(({ publicId, frequencyHz, edge }) => ({
      publicId,
      frequencyHz,
      edge,
      gamma: gammaAt(sweep, frequencyHz),
      side: sideAt(sweep, frequencyHz, noise),
      slope: slopeQ(sweep, frequencyHz, noise),
      zero: nearestZero(zeros, frequencyHz),
    })),
    moreDips: Math.max(0, inView.length - MOST_ROWS),
    match: matchAt(sweep, asked(sweep, inView, at)),
  };
}

/** Points for lines over frequency, and as many even steps along the line of Γ, which runs fast where little of the frequency is. */
function drawnPoints(sweep: Sweep, range: Range): number[] {
  const over = decimate(sweep, POINTS, range);
  if (over.length < POINTS) return Array.from(over);
  const along = evenSteps(sweep, over[0], over[over.length - 1], POINTS);
  return [...new Set([...over, ...along])].sort((a, b) => a - b);
}

/** The frequency that is asked for, with what is wrong with it; without one the deepest dip in view, or its middle. */
function asked(sweep: Sweep, dips: readonly AskedDip[], at: string | null) {
  const { frequencyHz: f } = sweep;
  const [startHz, stopHz] = [f[0], f[f.length - 1]];
  const deepest = dips.reduce<AskedDip | null>(
    (best, dip) => (best && best.returnLossDb >= dip.returnLossDb ? best : dip),
    null,
  );
  const usual = deepest?.frequencyHz ?? f[f.length >> 1];
  if (at === null || at.trim() === "") return { hz: usual, problem: null };
  const hz = parseFrequency(at);
  if (hz === null) return { hz: usual, problem: "not-a-frequency" as const };
  // A bare number that can't be hertz is megahertz, as everywhere in addresses; the page says what it took.
  const taken = [hz, hz * 1e6].find((one) => one >= startHz && one <= stopHz);
  return taken === undefined ? { hz: usual, problem: "outside" as const } : { hz: taken, problem: null };
}

function matchAt(sweep: Sweep, { hz, problem }: ReturnType<typeof asked>) {
  const gamma = gammaAt(sweep, hz);
  const load: Complex | null = gamma && gammaToImpedance(gamma, sweep.referenceOhm);
  return {
    hz,
    problem,
    startHz: sweep.frequencyHz[0],
    stopHz: sweep.frequencyHz[sweep.frequencyHz.length - 1],
    gamma,
    load,
    singles: load ? singleElements(load, sweep.referenceOhm, hz) : [],
    networks: load ? lNetworks(load, sweep.referenceOhm, hz) : [],
  };
}

/** One a pixel of the widest of these charts. */
const POINTS = 500;
/** Dips and resonances beyond this many are a line's ripple; the table of dips has them all. */
const MOST_ROWS = 24;

export type ComplexData = NonNullable<ReturnType<typeof loadComplex>>;
