/** A colour as red, green, blue, 0 to 255. */
export type Rgb = [number, number, number];

/**
 * Lightness and two colour axes in which distances are about as large as they look.
 *
 * Method: B. Ottosson, "A perceptual color space for image processing" (Oklab), 2020; coefficients from
 * memory, checked against its white (1, 0, 0) and the published sRGB primaries' lightness in the tests.
 */
export function oklab([red, green, blue]: Rgb): [number, number, number] {
  const r = LINEAR[clampByte(red)];
  const g = LINEAR[clampByte(green)];
  const b = LINEAR[clampByte(blue)];
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b);
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b);
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b);
  return [
    0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s,
  ];
}

/** Distance of two colours as they look: 0.02 is just seen, black to white is 1. */
export function lookApart(a: Rgb, b: Rgb): number {
  const p = oklab(a);
  const q = oklab(b);
  return Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
}

export function hexOf(color: Rgb): string {
  return `#${color.map((c) => clampByte(c).toString(16).padStart(2, "0")).join("")}`;
}

/** A colour written as #rrggbb, or null. */
export function rgbOf(hex: string): Rgb | null {
  const match = /^#?([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(hex.trim());
  return match
    ? [Number.parseInt(match[1], 16), Number.parseInt(match[2], 16), Number.parseInt(match[3], 16)]
    : null;
}

function clampByte(value: number): number {
  return Math.max(0, Math.min(255, Math.round(value)));
}

const LINEAR = Float64Array.from({ length: 256 }, (_, i) => {
  const v = i / 255;
  return v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4;
});
