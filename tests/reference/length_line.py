#!/usr/bin/python3
"""Lines through log frequency against log length as scipy has them: writes tests/fixtures/measurement/length-line.json.

Debian package: python3-scipy. Slope and its interval from scipy.stats.linregress and Student's t; the interval for one new
sweep from the covariance of a linear model by numpy.linalg; lengths for a frequency and their ends by Brent's method on those
intervals, without a closed form. Lengths and frequencies invented.
"""
import json, os
import numpy as np
from scipy.optimize import brentq
from scipy.stats import linregress, t as student

OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "measurement", "length-line.json")
rng = np.random.default_rng(20261201)

def case(n, slope, noise):
    lengths = 10.2 * np.exp(np.sort(rng.uniform(-0.06, 0.06, n)))
    hz = 7.1e6 * (lengths / 10.2) ** slope * np.exp(noise * rng.normal(size=n))
    x, y = np.log(lengths), np.log(hz)
    fit = linregress(x, y); q = student.ppf(0.975, n - 2)
    design = np.column_stack([np.ones(n), x]); beta, rss, *_ = np.linalg.lstsq(design, y, rcond=None)
    cov = np.linalg.inv(design.T @ design) * rss[0] / (n - 2); s2 = rss[0] / (n - 2)
    def half(at): v = np.array([1, at]); return q * np.sqrt(s2 + v @ cov @ v)
    line = lambda at: beta[0] + beta[1] * at
    at_m = float(10.2 * np.exp(rng.uniform(-0.08, 0.08))); a = np.log(at_m); wanted = float(7.1e6 * np.exp(rng.uniform(-0.05, 0.05))); w = np.log(wanted)
    centre = (w - beta[0]) / beta[1]
    ends = sorted(brentq(lambda at: line(at) + side * half(at) - w, centre - 3, centre + 3) for side in (1, -1))
    return {"lengthsM": lengths.tolist(), "hz": hz.tolist(), "slope": fit.slope, "slopeHalf": q * fit.stderr,
            "atM": at_m, "atHz": float(np.exp(line(a))), "atLow": float(np.exp(line(a) - half(a))), "atHigh": float(np.exp(line(a) + half(a))),
            "wantedHz": wanted, "lengthM": float(np.exp(centre)), "lengthLow": float(np.exp(ends[0])), "lengthHigh": float(np.exp(ends[1]))}

json.dump([case(int(n), s, e) for n, s, e in [(8, -1, 1e-3), (9, -0.7, 2e-3), (12, -0.95, 5e-4), (20, -1.02, 4e-3), (30, -0.85, 1e-3)]], open(OUT, "w"), indent=1)
