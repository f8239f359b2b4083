/** A length of line between the port and the antenna. */
export interface Feedline {
  /** Name of the cable's entry, or "own values". */
  name: string;
  /** dB per metre: k1·√f + k2·f with f in MHz. */
  k1: number;
  k2: number;
  lengthM: number;
  velocityFactor: number;
}
