import type { Parameter } from "./options.ts";

/**
 * One port's reflection coefficient from a network matrix of n ports, every other port closed with its own reference.
 *
 * `m`: n×n complex, row by row, real and imaginary part in turn, already normalised to the ports' references
 * (z = Z/√(Ri·Rj), y = Y·√(Ri·Rj), h and g likewise). H and G have two ports. Result in `out` as [re, im]; NaN where the
 * matrix has no such reflection. S = (z − 1)(z + 1)⁻¹ = (1 − y)(1 + y)⁻¹: D. M. Pozar, Microwave Engineering,
 * table 4.2 (from memory, not seen; checked against scikit-rf in the tests).
 */
export function reflectionAt(
  parameter: Parameter,
  m: Float64Array,
  n: number,
  port: number,
  out: Float64Array,
): void {
  const at = 2 * (port * n + port);
  if (parameter === "S") {
    out[0] = m[at];
    out[1] = m[at + 1];
  } else if (n === 1) fraction(parameter === "Z" || parameter === "H" ? 1 : -1, m[0], m[1], out);
  else if (parameter === "H" || parameter === "G") hybrid(parameter, m, port, out);
  else solved(parameter === "Z" ? 1 : -1, m, n, port, out);
}

/** ±(x − 1)/(x + 1). */
function fraction(sign: number, re: number, im: number, out: Float64Array): void {
  const below = (re + 1) ** 2 + im ** 2;
  out[0] = (sign * ((re - 1) * (re + 1) + im * im)) / below;
  out[1] = (sign * 2 * im) / below;
}

/** Hybrid forms: port 1 is an impedance in h, an admittance in g; port 2 the other way round. */
function hybrid(parameter: "H" | "G", m: Float64Array, port: number, out: Float64Array): void {
  const [ar, ai, br, bi, cr, ci, dr, di] = m;
  const pr = br * cr - bi * ci;
  const pi = br * ci + bi * cr;
  const product = (xr: number, xi: number, yr: number, yi: number) => [xr * yr - xi * yi, xr * yi + xi * yr];
  const [fullRe, fullIm] = product(ar + 1, ai, dr + 1, di);
  const [lr, li] = [fullRe - pr, fullIm - pi];
  const impedance = (parameter === "H") === (port === 0);
  const [oneRe, oneIm] = port === 0 ? product(ar - 1, ai, dr + 1, di) : product(ar + 1, ai, dr - 1, di);
  const [tr, ti] = [oneRe - pr, oneIm - pi];
  const sign = impedance ? 1 : -1;
  const below = lr * lr + li * li;
  out[0] = (sign * (tr * lr + ti * li)) / below;
  out[1] = (sign * (ti * lr - tr * li)) / below;
}

/** Element (port, port) of ±(a − 1)(a + 1)⁻¹ = ±(1 − 2(a + 1)⁻¹), by elimination with pivoting. */
function solved(sign: number, m: Float64Array, n: number, port: number, out: Float64Array): void {
  const a = m.slice(0, 2 * n * n);
  for (let i = 0; i < n; i++) a[2 * (i * n + i)] += 1;
  const b = new Float64Array(2 * n);
  b[2 * port] = 1;
  for (let k = 0; k < n; k++) {
    swapRows(a, b, n, k);
    const kr = a[2 * (k * n + k)];
    const ki = a[2 * (k * n + k) + 1];
    const below = kr * kr + ki * ki;
    for (let i = 0; i < n; i++) {
      if (i === k) continue;
      const at = 2 * (i * n + k);
      const fr = (a[at] * kr + a[at + 1] * ki) / below;
      const fi = (a[at + 1] * kr - a[at] * ki) / below;
      for (let j = k; j < n; j++)
        subtract(a, 2 * (i * n + j), fr, fi, a[2 * (k * n + j)], a[2 * (k * n + j) + 1]);
      subtract(b, 2 * i, fr, fi, b[2 * k], b[2 * k + 1]);
    }
  }
  const at = 2 * (port * n + port);
  const below = a[at] ** 2 + a[at + 1] ** 2;
  const re = (b[2 * port] * a[at] + b[2 * port + 1] * a[at + 1]) / below;
  const im = (b[2 * port + 1] * a[at] - b[2 * port] * a[at + 1]) / below;
  out[0] = sign * (1 - 2 * re);
  out[1] = sign * -2 * im;
}

function subtract(x: Float64Array, at: number, fr: number, fi: number, yr: number, yi: number): void {
  x[at] -= fr * yr - fi * yi;
  x[at + 1] -= fr * yi + fi * yr;
}

function swapRows(a: Float64Array, b: Float64Array, n: number, k: number): void {
  const size = (i: number) => a[2 * (i * n + k)] ** 2 + a[2 * (i * n + k) + 1] ** 2;
  let best = k;
  for (let i = k + 1; i < n; i++) if (size(i) > size(best)) best = i;
  if (best === k) return;
  const swap = (x: Float64Array, i: number, j: number) => {
    [x[i], x[j]] = [x[j], x[i]];
  };
  for (let j = 0; j < 2 * n; j++) swap(a, 2 * k * n + j, 2 * best * n + j);
  swap(b, 2 * k, 2 * best);
  swap(b, 2 * k + 1, 2 * best + 1);
}
