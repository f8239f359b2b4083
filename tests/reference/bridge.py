#!/usr/bin/python3
"""A resistive return-loss bridge by nodal analysis: writes tests/fixtures/measurement/bridge.json. Needs python3-numpy only.

Source E behind Zs at node A; arms A-B, A-C, B-ground, unknown C-ground; detector Zd from B to C. Voltages by solving the node
equations (Kirchhoff), no formula of a bridge anywhere. Then invented bridges whose arms, source and detector are off, with a line
between the bridge and its port, swept with open, short, load and antennas: whole benches whose truth is known.
"""
import json, os
import numpy as np

rng = np.random.default_rng(20241202)
OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "measurement", "bridge.json")

def detector(zu, ab=50, ac=50, bg=50, zs=50, zd=50, source=1.0):
    """Voltage across the detector; zu may be 0 or infinite."""
    yu = 1e12 if zu == 0 else 0 if np.isinf(zu) else 1 / zu
    g = lambda z: 0 if np.isinf(z) else 1 / z
    y = np.array([[g(zs) + g(ab) + g(ac), -g(ab), -g(ac)],
                  [-g(ab), g(ab) + g(bg) + g(zd), -g(zd)],
                  [-g(ac), -g(zd), g(ac) + yu + g(zd)]], complex)
    v = np.linalg.solve(y, np.array([source * g(zs), 0, 0], complex))
    return v[2] - v[1]

db = lambda x: float(20 * np.log10(abs(x)))
def line(**off):
    return (abs(detector(np.inf, **off)) + abs(detector(0, **off))) / 2

available = 1 / (4 * 50)
loss = {name: float(10 * np.log10(available / (abs(detector(z)) ** 2 / 50))) for name, z in [("open", np.inf), ("short", 0.0)]}
arms = [[r, *[-db(detector(50, **{arm: r}) / line(**{arm: r})) for arm in ("ab", "ac", "bg")]] for r in [45, 47, 49, 49.5, 49.6, 49.9, 50.1, 50.4, 50.5, 51, 55]]
mismatched = [{"zs": zs, "zd": None if np.isinf(zd) else zd, "openOverShortDb": db(detector(np.inf, zs=zs, zd=zd) / detector(0, zs=zs, zd=zd)),
               "returnLossDb": [[r, -db(detector(r, zs=zs, zd=zd) / line(zs=zs, zd=zd))] for r in (25, 100)]}
              for zs, zd in [(40, 50), (50, 40), (50, np.inf)]]

f = np.linspace(1e6, 500e6, 61); benches = []
for _ in range(24):
    off = {arm: float(50 + rng.normal() * 1.2) for arm in ("ab", "ac", "bg")}
    off |= {"zs": float(50 + rng.normal() * 5), "zd": float(50 + rng.normal() * 5)}
    delay = rng.uniform(2e-9, 6e-9); turn = np.exp(-4j * np.pi * f * delay)
    def sweep(gamma):
        seen = gamma * turn
        return [float(f"{abs(detector(np.inf if g == 1 else 50 * (1 + g) / (1 - g), **off)):.9g}") for g in seen]
    size = rng.uniform(0.02, 0.95); antenna = size * np.exp(1j * (rng.uniform(0, 6) - 2 * np.pi * f * rng.uniform(1e-9, 2e-8)))
    benches.append({"open": sweep(np.ones_like(f)), "short": sweep(-np.ones_like(f)), "load": sweep(np.zeros_like(f)), "antenna": sweep(antenna), "truth": size})

json.dump({"lossDb": loss, "arms": arms, "mismatched": mismatched, "frequencyHz": f.tolist(), "benches": benches}, open(OUT, "w"), separators=(",", ":"))
print(loss, arms[4], [m["openOverShortDb"] for m in mismatched], len(benches), "benches")
