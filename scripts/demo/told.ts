import type { Dip, Sweep } from "~/measurement/sweep";
import { formatDb, formatFrequency, formatSwr, formatWidth } from "~/measurement/units";

/** What people of the story read off the pages: numbers as the analysis found them, in words. */

export interface ToldDip {
  hz: number;
  swr: number;
  widthHz: number | null;
  /** "52.20 MHz" as a link to the dip. */
  link: string;
  /** "52.20 MHz" */
  f: string;
  /** "1.08" */
  s: string;
  /** "3.1 MHz", or "no width" */
  w: string;
  /** "± 13 kHz" */
  pm: string;
}

export interface KnownSweep {
  publicId: string;
  path: string;
  title: string;
  dips: { publicId: string; id: number; numbers: Dip }[];
  points: Sweep;
}

export class Told {
  readonly #projectPath: string;
  readonly #sweeps = new Map<string, KnownSweep>();
  readonly #benches = new Map<string, string>();
  readonly #steps = new Map<string, string>();

  constructor(projectPath: string) {
    this.#projectPath = projectPath;
  }

  add(key: string, sweep: KnownSweep): void {
    this.#sweeps.set(key, sweep);
  }

  addBench(key: string, name: string, publicId: string): void {
    this.#benches.set(key, `[${name}](${this.#projectPath}/benches/${publicId})`);
  }

  /** A bench's name as a link to it. */
  bench(key: string): string {
    const bench = this.#benches.get(key);
    if (!bench) throw new Error(`The demo has no bench "${key}" yet.`);
    return bench;
  }

  addStep(key: string, title: string, publicId: string): void {
    this.#steps.set(key, `[${title}](${this.#projectPath}/steps/${publicId})`);
  }

  /** A step's title as a link to it. */
  step(key: string): string {
    const step = this.#steps.get(key);
    if (!step) throw new Error(`The demo has no step "${key}" yet.`);
    return step;
  }

  /** The sweep's title as a link to it. */
  sweep(key: string): string {
    const { title, path } = this.known(key);
    return `[${title}](${path})`;
  }

  dip(key: string, nearMhz: number): ToldDip {
    const { publicId, numbers } = this.found(key, nearMhz);
    const { frequencyHz, frequencyUncertaintyHz, minimumSwr, bandwidth } = numbers;
    const f = formatFrequency(frequencyHz, frequencyUncertaintyHz);
    return {
      hz: frequencyHz,
      swr: minimumSwr,
      widthHz: bandwidth?.widthHz ?? null,
      f,
      link: `[${f}](${this.#projectPath}/dips/${publicId})`,
      s: formatSwr(minimumSwr),
      w: bandwidth ? formatWidth(bandwidth.widthHz, bandwidth.widthUncertaintyHz) : "no width",
      pm:
        frequencyUncertaintyHz === null
          ? "by an unknown amount"
          : `± ${formatWidth(frequencyUncertaintyHz, frequencyUncertaintyHz)}`,
    };
  }

  /** The dip of a sweep within a twentieth of a frequency; the story stops where there is none. */
  found(key: string, nearMhz: number) {
    const near = this.known(key).dips.filter(
      ({ numbers }) => Math.abs(numbers.frequencyHz / 1e6 / nearMhz - 1) < 0.05,
    );
    const best = near.sort((a, b) => a.numbers.minimumSwr - b.numbers.minimumSwr)[0];
    if (!best) throw new Error(`The demo's sweep "${key}" has no dip near ${nearMhz} MHz.`);
    return best;
  }

  has(key: string, nearMhz: number): boolean {
    return this.known(key).dips.some(
      ({ numbers }) => Math.abs(numbers.frequencyHz / 1e6 / nearMhz - 1) < 0.05,
    );
  }

  /** Return loss at a frequency, dB. */
  lossDb(key: string, mhz: number): number {
    const { frequencyHz, magnitude } = this.known(key).points;
    let best = 0;
    for (let i = 1; i < frequencyHz.length; i++) {
      if (Math.abs(frequencyHz[i] - mhz * 1e6) < Math.abs(frequencyHz[best] - mhz * 1e6)) best = i;
    }
    return -20 * Math.log10(magnitude[best]);
  }

  loss(key: string, mhz: number): string {
    return formatDb(this.lossDb(key, mhz));
  }

  /** SWR at a frequency, "1.31". */
  swrAt(key: string, mhz: number): string {
    const size = 10 ** (-this.lossDb(key, mhz) / 20);
    return formatSwr((1 + size) / (1 - size));
  }

  known(key: string): KnownSweep {
    const sweep = this.#sweeps.get(key);
    if (!sweep) throw new Error(`The demo has no sweep "${key}" yet.`);
    return sweep;
  }
}

/** "54.4 MHz": a frequency that somebody worked out, with as many digits as such a sum deserves. */
export function mhz(hz: number, digits = 2): string {
  return `${(hz / 1e6).toFixed(digits)} MHz`;
}

/** "1.1 % below" */
export function aside(ratio: number): string {
  return `${Math.abs((ratio - 1) * 100).toFixed(1)} % ${ratio < 1 ? "below" : "above"}`;
}

/** "+3.3 %" */
export function percent(ratio: number, digits = 1): string {
  const value = (ratio - 1) * 100;
  return `${value < 0 ? "−" : "+"}${Math.abs(value).toFixed(digits)} %`;
}

/** "−11.9 dBm" */
export function dbm(level: number): string {
  return `${level < 0 ? "−" : ""}${Math.abs(level)} dBm`;
}

export function khz(hz: number): string {
  return `${Math.round(Math.abs(hz) / 1e3)} kHz`;
}
