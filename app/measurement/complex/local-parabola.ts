/** Value and slope at x = 0 of a fitted parabola, with their covariance for samples of variance 1·σ². */
export interface Parabola {
  value: number;
  slope: number;
  valueVariance: number;
  slopeVariance: number;
  covariance: number;
}

/**
 * The parabola by weighted least squares through `y` at `x`, read at x = 0, each sample with standard deviation `sigma` (in a common
 * unit: the variances are per that unit squared). All length n, x of order 1 or less, at least three different ones; null where
 * they are not or a value is not finite. Normal equations (C. L. Lawson & R. J. Hanson, Solving Least Squares Problems, 1974; from
 * memory, not seen) on x scaled to its reach; the same as local polynomial smoothing of A. Savitzky & M. J. E. Golay, Anal. Chem.
 * 36(8), 1627-1639, 1964 (from memory, not seen), for any spacing.
 */
export function localParabola(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  sigma: ArrayLike<number>,
): Parabola | null {
  let reach = 0;
  for (let i = 0; i < x.length; i++) reach = Math.max(reach, Math.abs(x[i]));
  if (!(reach > 0)) return null;
  const s = [0, 0, 0, 0, 0];
  const t = [0, 0, 0];
  for (let i = 0; i < x.length; i++) {
    const u = x[i] / reach;
    const weight = 1 / sigma[i] ** 2;
    for (let k = 0, power = weight; k < 5; k++, power *= u) {
      s[k] += power;
      if (k < 3) t[k] += power * y[i];
    }
  }
  // Inverse of the symmetric matrix [[s0 s1 s2] [s1 s2 s3] [s2 s3 s4]] by its cofactors.
  const c00 = s[2] * s[4] - s[3] * s[3];
  const c01 = s[2] * s[3] - s[1] * s[4];
  const c02 = s[1] * s[3] - s[2] * s[2];
  const c11 = s[0] * s[4] - s[2] * s[2];
  const c12 = s[1] * s[2] - s[0] * s[3];
  const determinant = s[0] * c00 + s[1] * c01 + s[2] * c02;
  if (!(determinant > SINGULAR * s[0] * s[2] * s[4])) return null;
  const value = (c00 * t[0] + c01 * t[1] + c02 * t[2]) / determinant;
  const slope = (c01 * t[0] + c11 * t[1] + c12 * t[2]) / determinant / reach;
  if (!Number.isFinite(value) || !Number.isFinite(slope)) return null;
  return {
    value,
    slope,
    valueVariance: c00 / determinant,
    slopeVariance: c11 / determinant / reach ** 2,
    covariance: c01 / determinant / reach,
  };
}

/** Relative to the matrix' own size: under this two of three frequencies are the same. */
const SINGULAR = 1e-12;
