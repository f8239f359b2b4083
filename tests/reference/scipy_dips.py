#!/usr/bin/python3
"""Dips, prominences, quantiles and a fit's covariance as scipy has them: writes tests/fixtures/measurement/scipy.json.

Debian package: python3-scipy. Curves are return losses in hundredths of a decibel (whole numbers, so that plateaus and ties
are plenty and every prominence is exact): resonators, noise, random walks, coarse stairs, flat and tiny curves. Invented, seeded.
"""
import json, os
import numpy as np
from scipy.optimize import curve_fit
from scipy.signal import find_peaks
from scipy.stats import t as student

rng = np.random.default_rng(20240611)
OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "measurement", "scipy.json")

def resonators(n, count, noise):
    x = np.linspace(0, 1, n); power = np.full(n, rng.uniform(0.9, 0.99))
    for _ in range(count):
        centre, width, depth = rng.uniform(-0.02, 1.02), 10 ** rng.uniform(-2.3, -1), rng.uniform(0.5, 0.998)
        power *= 1 - depth / (1 + ((x - centre) / width) ** 2)
    return -10 * np.log10(power) + noise * rng.normal(size=n)

def curve(kind):
    n = int(rng.integers(40, 160))
    if kind == 0: return resonators(n, int(rng.integers(1, 7)), 0)
    if kind == 1: return resonators(n, int(rng.integers(1, 5)), rng.uniform(0.02, 1.5))
    if kind == 2: return 10 + np.cumsum(rng.normal(size=n))
    if kind == 3: return np.round(resonators(n, 4, 0.3) / 2) * 2
    if kind == 4: return rng.integers(0, 5, int(rng.integers(1, 25))) * 1.5
    return np.abs(rng.normal(8, 5, n))

curves = []
for i in range(252):
    hundredths = np.round(np.clip(curve(i % 6), 0, 60) * 100).astype(int)
    peaks, found = find_peaks(hundredths, prominence=0)
    prominent, _ = find_peaks(hundredths, prominence=300)
    curves.append({"rl": hundredths.tolist(), "peaks": peaks.tolist(), "prominences": found["prominences"].astype(int).tolist(), "prominent": prominent.tolist()})

def model(x, depth, x0, log_kappa, far):
    w = np.exp(log_kappa) * 2 * np.sinh(x - x0); return far - depth / (1 + w * w)

fits = []
for _ in range(6):
    true = [rng.uniform(0.7, 0.95), rng.uniform(-0.02, 0.02), np.log(rng.uniform(5, 30)), rng.uniform(0.96, 1)]
    x = np.linspace(-0.15, 0.15, 41); sigma = rng.uniform(0.002, 0.02, 41); y = model(x, *true) + sigma * rng.normal(size=41)
    p, covariance = curve_fit(model, x, y, p0=true, sigma=sigma, absolute_sigma=True, ftol=1e-15, xtol=1e-15, gtol=1e-15)
    fits.append({"x": x.tolist(), "y": y.tolist(), "sigma": sigma.tolist(), "start": true, "p": p.tolist(), "covariance": covariance.tolist()})

freedoms = [1, 2, 3, 4, 5, 6, 8, 10, 15, 20, 30, 60, 120, 1000]
quantiles = [[v, float(student.ppf(0.975, v))] for v in freedoms]
json.dump({"curves": curves, "fits": fits, "student95": quantiles}, open(OUT, "w"), separators=(",", ":"))
print(len(curves), "curves,", sum(len(c["peaks"]) for c in curves), "peaks,", sum(len(c["prominent"]) for c in curves), "of 3 dB and more")
