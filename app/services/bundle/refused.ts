/** A bundle that is not taken in: what is wrong with it, each in a sentence for the person who gave it. */
export class Refused extends Error {
  readonly faults: string[];
  constructor(faults: string | string[]) {
    super(typeof faults === "string" ? faults : faults[0]);
    this.faults = (typeof faults === "string" ? [faults] : faults).slice(0, MOST_TOLD);
  }
}

const MOST_TOLD = 20;
