/** A bundle that is not made or not taken in, and won't be at another try: why, each in a sentence for the person who asked. */
export class Refused extends Error {
  readonly faults: string[];
  constructor(faults: string | string[]) {
    super(typeof faults === "string" ? faults : faults[0]);
    this.faults = (typeof faults === "string" ? [faults] : faults).slice(0, MOST_TOLD);
  }
}

const MOST_TOLD = 20;
