#!/usr/bin/python3
"""Feed impedances from the NEC-2 solver and the dips on them, by means of their own.

  tests/reference/nec_dips.py [--solve]

Debian packages: nec2c (only with --solve), python3-scipy. For every tests/fixtures/measurement/nec/NAME.nec it writes
NAME.csv (frequency in MHz, resistance and reactance in ohm) and NAME.json: the dips of abs(Gamma) in 50 ohm on cubic splines through
R and X, the lowest by bounded minimisation, the edges at SWR 2 by Brent's method. Nothing is shared with the code under test.
"""
import csv, glob, json, math, os, re, subprocess, sys, tempfile
import numpy as np
from scipy.interpolate import CubicSpline
from scipy.optimize import brentq, minimize_scalar
from scipy.signal import find_peaks

HERE = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "measurement", "nec")
Z0 = 50.0

def solve(deck):
    with tempfile.TemporaryDirectory() as folder:
        out = os.path.join(folder, "out")
        subprocess.run(["nec2c", "-i", deck, "-o", out], check=True, stdout=subprocess.DEVNULL)
        lines = open(out, errors="replace").read().splitlines()
    rows, wanted = [], False
    for line in lines:
        if "ANTENNA INPUT PARAMETERS" in line: wanted = True; continue
        cells = line.split()
        if wanted and len(cells) >= 11 and cells[0].isdigit():
            rows.append((float(cells[6]), float(cells[7]))); wanted = False
    card = next(l for l in open(deck) if l.startswith("FR")).split()
    count, start, step = int(card[2]), float(card[5]), float(card[6])
    assert len(rows) == count, (deck, len(rows), count)
    return [(round(start + i * step, 6), r, x) for i, (r, x) in enumerate(rows)]

def dips(rows):
    f, r, x = (np.array(c) for c in zip(*rows))
    resistance, reactance = CubicSpline(f, r), CubicSpline(f, x)
    def gamma(at):
        z = complex(resistance(at), reactance(at)); return abs((z - Z0) / (z + Z0))
    swr = lambda at: (1 + gamma(at)) / (1 - gamma(at))
    g = np.array([gamma(at) for at in f]); found = []
    for i in find_peaks(-20 * np.log10(g), prominence=3)[0]:
        best = minimize_scalar(gamma, bounds=(f[i - 1], f[i + 1]), method="bounded", options={"xatol": 1e-9})
        dip = {"mhz": best.x, "swr": swr(best.x), "low": None, "high": None}
        if dip["swr"] < 2:
            j, k = i, i
            while j > 0 and swr(f[j]) <= 2: j -= 1
            while k < len(f) - 1 and swr(f[k]) <= 2: k += 1
            if swr(f[j]) > 2: dip["low"] = brentq(lambda at: swr(at) - 2, f[j], f[j + 1], xtol=1e-10)
            if swr(f[k]) > 2: dip["high"] = brentq(lambda at: swr(at) - 2, f[k - 1], f[k], xtol=1e-10)
        found.append(dip)
    return found

for deck in sorted(glob.glob(os.path.join(HERE, "*.nec"))):
    name = deck[:-4]
    if "--solve" in sys.argv:
        with open(name + ".csv", "w") as out:
            out.write("mhz,ohm,reactance\n")
            for row in solve(deck): out.write("%.6g,%.6g,%.6g\n" % row)
    rows = [tuple(map(float, row)) for row in list(csv.reader(open(name + ".csv")))[1:]]
    json.dump(dips(rows), open(name + ".json", "w"), indent=1)
