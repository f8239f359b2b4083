/** The file that the worked examples send: invented, a series resonator against 50 Ω. Pure. */

/** 121 points from 6 to 8.2 MHz, Touchstone; 60 Ω at `resonanceMhz`, Q 1000 / 60. */
export function sampleFile(resonanceMhz: number): string {
  const lines = [`! Invented: a reed pole, resonant at ${resonanceMhz} MHz`, "# MHz S RI R 50"];
  for (let i = 0; i < POINTS; i++) {
    const mhz = FROM_MHZ + ((TO_MHZ - FROM_MHZ) * i) / (POINTS - 1);
    const x = 1000 * (mhz / resonanceMhz - resonanceMhz / mhz);
    const [re, im] = gamma(60, x);
    lines.push(`${mhz.toFixed(4)} ${re.toFixed(6)} ${im.toFixed(6)}`);
  }
  return `${lines.join("\n")}\n`;
}

/** (Z − 50 Ω) / (Z + 50 Ω) of R + jX, as real and imaginary part. */
function gamma(r: number, x: number): [number, number] {
  const below = (r + 50) ** 2 + x ** 2;
  return [((r - 50) * (r + 50) + x ** 2) / below, (100 * x) / below];
}

const POINTS = 121;
const FROM_MHZ = 6;
const TO_MHZ = 8.2;
