#!/usr/bin/python3
"""Where the dips of known antennas come from, by taking wires away: writes tests/fixtures/nec/.

  tests/reference/nec_causes.py [NAME…]      all models of nec_models.py, or those named; "trims" for trims.json

Debian packages: nec2c, python3-scipy. For each model: NAME.nec (the deck), NAME.csv (abs Gamma in 50 ohm, in 1/100,000, each row the
difference to the row before; the first line has start and step in Hz) and NAME.json: the antenna, the dips (own search, on cubic
splines) and for each its origin. A wire that may be taken away is the origin of a dip that has no partner in the sweep without it: dips of
both sweeps are paired with the least total distance in log frequency, at most GATE apart. What no removal explains is of the
wires that carry the feed; where these are several, of each whose shortening by 2 % moves the dip by at least QUARTER of the 2 %.
trims.json: an element of the wrong length, cut by proportion once, then by the line through both, solved again each time.
Nothing is shared with the code under test.
"""
import copy, json, math, os, re, subprocess, sys, tempfile
import numpy as np
from scipy.interpolate import CubicSpline
from scipy.optimize import linear_sum_assignment, minimize_scalar
from scipy.signal import find_peaks
sys.path.insert(0, os.path.dirname(os.path.abspath(__file__)))
from nec_models import MODELS

OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "nec")
C = 299.792458
TIMES = 20          # the sweep's top over the lowest design frequency
PER_LOWEST = 100    # points per lowest design frequency
SEGMENTS = 10       # per wavelength at the top
GATE = 0.025        # what a dip may move by mere coupling
QUARTER = 0.25

def deck(model, card, like=None, longest=None):
    """`like`: the model whose wires give the numbers of segments, so that a change of length changes nothing else."""
    longest = longest or C / (model["lowestMhz"] * TIMES) / SEGMENTS
    lines, tag, feed = ["CM " + model["name"] + ", invented", "CE"], 0, None
    for key, part in model["elements"].items():
        for at, (*ends, radius) in enumerate(part["wires"]):
            tag += 1
            first = (like or model)["elements"][key]["wires"][at]
            count = max(1, math.ceil(math.dist(first[:3], first[3:6]) / longest))
            if (key, at) == model["feed"][:2]:
                count += 1 - count % 2
                feed = (tag, {"start": 1, "middle": (count + 1) // 2, "end": count}[model["feed"][2]])
            lines.append("GW %d %d " % (tag, count) + " ".join("%.5f" % v for v in (*ends, radius)))
    perfect = model["ground"] == "perfect"
    lines += ["GE 1", "GN 1"] if perfect else ["GE 0"]
    return "\n".join(lines + ["EX 0 %d %d 0 1.0 0.0" % feed, "FR 0 %d 0 0 %.6f %.6f" % card, "XQ 0", "EN"]) + "\n"

def solve(text):
    """Impedances in the order of the FR card; nec2c prints five digits of frequency, so that comes from the card."""
    with tempfile.TemporaryDirectory() as folder:
        inp, out = os.path.join(folder, "in"), os.path.join(folder, "out")
        open(inp, "w").write(text)
        subprocess.run(["nec2c", "-i", inp, "-o", out], check=True, stdout=subprocess.DEVNULL)
        lines = open(out, errors="replace").read().splitlines()
    z, wanted = [], False
    for line in lines:
        if "ANTENNA INPUT PARAMETERS" in line: wanted = True; continue
        cells = line.split()
        if wanted and len(cells) >= 11 and cells[0].isdigit(): z.append(complex(float(cells[6]), float(cells[7]))); wanted = False
    count, start, step = [float(v) for v in re.search(r"^FR 0 (\d+) 0 0 (\S+) (\S+)", text, re.M).groups()]
    assert len(z) == count, (len(z), count)
    return start + step * np.arange(len(z)), np.array(z)

def dips(mhz, z, prominence):
    re_, im = CubicSpline(mhz, z.real), CubicSpline(mhz, z.imag)
    gamma = lambda f: abs((complex(re_(f), im(f)) - 50) / (complex(re_(f), im(f)) + 50))
    level = -20 * np.log10(np.maximum(1e-6, np.abs((z - 50) / (z + 50))))
    found = []
    for i in find_peaks(level, prominence=prominence)[0]:
        best = minimize_scalar(gamma, bounds=(mhz[i - 1], mhz[i + 1]), method="bounded", options={"xatol": 1e-7})
        found.append((best.x, (1 + best.fun) / (1 - best.fun)))
    return found

def wide(model):
    low = model["lowestMhz"]
    return (int(PER_LOWEST * (TIMES - 0.5)) + 1, low / 2, low / PER_LOWEST)

def partners(of, among):
    """For each frequency of `of` the one of `among` that it goes with, or None."""
    if not of or not among: return [None] * len(of)
    cost = np.abs(np.log(np.array(of)[:, None] / np.array(among)[None, :]))
    rows, columns = linear_sum_assignment(np.minimum(cost, GATE * 4))
    pairs = {r: among[c] for r, c in zip(rows, columns) if cost[r, c] <= GATE}
    return [pairs.get(i) for i in range(len(of))]

def without(model, key):
    changed = copy.deepcopy(model); del changed["elements"][key]; return changed

def resized(model, key, factor):
    """The element longer or shorter at its free ends, alike; a loop all around, about the middle of its lowest side."""
    changed = copy.deepcopy(model); part = changed["elements"][key]
    ends = [e for p in model["elements"].values() for w in p["wires"] for e in (w[:3], w[3:6])]
    free = [(i, s) for i, w in enumerate(part["wires"]) for s in (0, 3)
            if ends.count(w[s:s + 3]) == 1 and not (model["ground"] == "perfect" and w[s + 2] == 0)]
    if not free:
        low = min(w[2] for w in part["wires"]); scale = lambda p: (p[0] * factor, p[1] * factor, low + (p[2] - low) * factor)
        part["wires"] = [(*scale(w[:3]), *scale(w[3:6]), w[6]) for w in part["wires"]]
        return changed
    more = (factor - 1) * length(model, key) * part["count"] / len(free)
    for i, s in free:
        w = list(part["wires"][i]); end, other = np.array(w[s:s + 3]), np.array(w[3 - s:6 - s])
        w[s:s + 3] = [float(v) for v in end + more * (end - other) / math.dist(end, other)]
        part["wires"][i] = tuple(w)
    return changed

def length(model, key):
    part = model["elements"][key]
    total = sum(math.dist(w[:3], w[3:6]) for w in part["wires"])
    return total / part["count"]

def swept(model):
    card = wide(model)
    mhz, z = solve(deck(model, card))
    base = dips(mhz, z, 3)
    at = [f for f, _ in base]
    origins = [[] for _ in base]; moves = [{} for _ in base]
    for key, part in model["elements"].items():
        if not part["removable"]: continue
        left = partners(at, [f for f, _ in dips(*solve(deck(without(model, key), card)), 0.5)])
        for i, f in enumerate(left):
            moves[i]["without " + key] = None if f is None else round(1e2 * (f / at[i] - 1), 3)
            if f is None: origins[i].append(key)
    fed = [k for k, p in model["elements"].items() if not p["removable"]]
    for key in fed if len(fed) > 1 else []:
        left = partners(at, [f for f, _ in dips(*solve(deck(resized(model, key, 0.98), card)), 0.5)])
        for i, f in enumerate(left):
            share = None if f is None else math.log(f / at[i]) / -math.log(0.98)
            moves[i]["shorter " + key] = None if share is None else round(share, 3)
    for i, origin in enumerate(origins):
        if origin: continue
        shares = {k: moves[i].get("shorter " + k) for k in fed}
        origin += [k for k in fed if len(fed) == 1 or shares[k] is None or shares[k] >= QUARTER] or [max(fed, key=lambda k: shares[k] or 0)]
    return mhz, z, [{"mhz": round(f, 5), "swr": round(s, 4), "origin": o, "moves": m} for (f, s), o, m in zip(base, origins, moves)]

def write(model):
    name, card = model["name"], wide(model)
    open(os.path.join(OUT, name + ".nec"), "w").write(deck(model, card))
    mhz, z, found = swept(model)
    units = np.rint(np.abs((z - 50) / (z + 50)) * 1e5).astype(int)
    with open(os.path.join(OUT, name + ".csv"), "w") as out:
        out.write("%d,%d\n" % (round(card[1] * 1e6), round(card[2] * 1e6)))
        out.write("\n".join(map(str, np.diff(units, prepend=0))) + "\n")
    parts = [{"key": k, **{f: p[f] for f in ("kind", "lengthM", "count", "heightM", "where")}} for k, p in model["elements"].items()]
    json.dump({"name": name, "lowestMhz": model["lowestMhz"], "ground": model["ground"], "elements": parts, "dips": found},
              open(os.path.join(OUT, name + ".json"), "w"), indent=1)
    print(name, len(found), [(d["mhz"], d["swr"], d["origin"]) for d in found], flush=True)

def dip_near(model, like, mhz):
    low, high = mhz * 0.84, mhz * 1.16
    step = mhz * 0.002
    card = (int((high - low) / step) + 1, low, step)
    found = dips(*solve(deck(model, card, like, C / mhz / 50)), 1)
    return min(found, key=lambda d: abs(math.log(d[0] / mhz)))[0]

def trimmed(model, key, mhz):
    """Of the wrong length by 1, 2 and 5 %: length and dip as found, after the proportion, after the line through both."""
    wanted = dip_near(model, model, mhz); rows = []
    for off in (-0.05, -0.02, -0.01, 0.01, 0.02, 0.05):
        factor, pairs = 1 + off, []
        for turn in range(3):
            f = dip_near(resized(model, key, factor), model, mhz)
            pairs.append((factor, f))
            if turn == 0: factor *= f / wanted
            else:
                slope = math.log(pairs[1][1] / pairs[0][1]) / math.log(pairs[1][0] / pairs[0][0])
                factor = pairs[0][0] * (wanted / pairs[0][1]) ** (1 / slope)
        rows.append({"off": off, "pairs": [[round(length(model, key) * k, 7), round(f, 6)] for k, f in pairs]})
    print(model["name"], key, wanted, [[round(100 * (f / wanted - 1), 3) for _, f in r["pairs"]] for r in rows], flush=True)
    return {"model": model["name"], "part": key, "wantedMhz": round(wanted, 6), "rounds": rows}

TRIMS = [("vertical-ground", "v", 7.19), ("vertical-guys", "v", 10.2), ("vertical-mast", "v", 14.4), ("vertical-mast", "m", 31.0), ("parallel", "a", 7.16),
         ("parallel", "b", 17.8), ("ground-plane", "v", 29.0), ("ground-plane", "r", 29.0), ("dipole", "d", 14.3), ("dipole-wire", "d", 10.2),
         ("dipole-feedline", "d", 7.1), ("dipoles", "a", 14.4), ("dipoles", "b", 21.7), ("inverted-vee", "d", 10.2), ("loop", "l", 22.0)]

if __name__ == "__main__":
    names = sys.argv[1:]
    if not names or "trims" in names:
        known = {m["name"]: m for m in MODELS}
        with open(os.path.join(OUT, "trims.json"), "w") as out:
            json.dump([trimmed(known[n], k, f) for n, k, f in TRIMS], out, indent=1)
    for one in MODELS:
        if not names or one["name"] in names: write(one)
