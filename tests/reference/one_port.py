#!/usr/bin/python3
"""One-port corrections and de-embedding as scikit-rf has them: writes tests/fixtures/measurement/one-port.json.

Debian package: python3-scikit-rf. Invented one-port instruments (three error terms that vary with frequency), measured through
with ideal and with described standards, corrected by skrf.calibration.OnePort; a lossy line taken off by Network.inv.
"""
import json, os, warnings
warnings.filterwarnings("ignore")
import numpy as np
import skrf as rf

rng = np.random.default_rng(20241201)
OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "measurement", "one-port.json")
f = np.linspace(1e6, 500e6, 31); w = 2 * np.pi * f
frequency = rf.Frequency.from_f(f, unit="hz")

def network(gamma): return rf.Network(frequency=frequency, s=np.asarray(gamma, complex).reshape(-1, 1, 1), z0=50)
def pair(values): return {"re": [float(v) for v in np.real(values)], "im": [float(v) for v in np.imag(values)]}
def term(size): return size * np.exp(1j * (rng.uniform(0, 6) + w * rng.uniform(-3e-9, 0)))

def described(c, l, tau, ohm):
    turn = np.exp(-2j * w * tau); zc = 1 / (1j * w * c) if c else None; zl = 1j * w * l
    opened = (zc - 50) / (zc + 50) if c else np.ones_like(f)
    return opened * turn, (zl - 50) / (zl + 50) * turn, np.full_like(f, (ohm - 50) / (ohm + 50))

cases = []
for standards in [(0, 0, 0, 50), (60e-15, 0, 0, 50), (80e-15, 2e-11, 31e-12, 50), (120e-15, 5e-11, 17e-12, 51.3), (0, 0, 40e-12, 49.1)]:
    e00, e11, tracking = term(rng.uniform(0.01, 0.2)), term(rng.uniform(0.02, 0.3)), term(rng.uniform(0.2, 1))
    measure = lambda g: e00 + tracking * g / (1 - e11 * g)
    ideals = described(*standards)
    dut = rng.uniform(0, 1) * np.exp(1j * (rng.uniform(0, 6) + w * rng.uniform(-9e-9, 0))) * np.abs(np.sin(w * 7e-9))
    calibration = rf.calibration.OnePort(ideals=[network(i) for i in ideals], measured=[network(measure(i)) for i in ideals], is_reciprocal=True)
    calibration.run()
    corrected = calibration.apply_cal(network(measure(dut))).s[:, 0, 0]
    cases.append({"standards": dict(zip(["openCapacitanceF", "shortInductanceH", "offsetDelayS", "loadOhm"], standards)),
                  "open": pair(measure(ideals[0])), "short": pair(measure(ideals[1])), "load": pair(measure(ideals[2])),
                  "measured": pair(measure(dut)), "corrected": pair(corrected), "true": pair(dut)})

lines = []
for k1, k2, length, vf in [(0.0056, 0.00006, 20, 0.66), (0.026, 0.00025, 3.7, 0.66), (0.004, 0.00001, 45, 0.85)]:
    loss = (k1 * np.sqrt(f / 1e6) + k2 * f / 1e6) * length
    gamma = loss / (20 / np.log(10)) + 1j * w * length / (299792458 * vf)
    medium = rf.media.DefinedGammaZ0(frequency=frequency, gamma=gamma / length, z0=50)
    line = medium.line(length, "m")
    antenna = network(0.6 * np.exp(-1j * w * 4e-9)); seen = line ** antenna
    lines.append({"k1": k1, "k2": k2, "lengthM": length, "velocityFactor": vf, "seen": pair(seen.s[:, 0, 0]),
                  "antenna": pair((line.inv ** seen).s[:, 0, 0])})

json.dump({"frequencyHz": f.tolist(), "cases": cases, "lines": lines}, open(OUT, "w"), separators=(",", ":"))
worst = max(np.abs(np.array(c["corrected"]["re"]) - c["true"]["re"]).max() for c in cases)
print(rf.__version__, len(cases), "corrections,", len(lines), "lines; skrf against what was simulated:", worst)
