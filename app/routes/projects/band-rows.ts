/** A design band as its form's row, and back. */
export function bandRowOf(band: { name: string; lowHz: number; highHz: number; swrLimit: number }) {
  return {
    name: band.name,
    lowMhz: inMegahertz(band.lowHz),
    highMhz: inMegahertz(band.highHz),
    swrLimit: String(band.swrLimit),
  };
}

export function bandInHertz(band: { name: string; lowMhz: number; highMhz: number; swrLimit: number }) {
  return {
    name: band.name,
    lowHz: Number((band.lowMhz * 1e6).toPrecision(12)),
    highHz: Number((band.highMhz * 1e6).toPrecision(12)),
    swrLimit: band.swrLimit,
  };
}

/** Without the last digits of a binary fraction: 7.1 MHz is stored as 7100000. */
function inMegahertz(hz: number): string {
  return String(Number((hz / 1e6).toPrecision(12)));
}
