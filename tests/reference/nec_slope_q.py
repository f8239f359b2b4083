"""Ten antennas of one resonance for NEC-2 (Debian's nec2c): decks and feed impedances around the resonance, in
tests/fixtures/measurement/nec-q. Also truth.json: Q by slope from scipy's cubic splines of R and X at the zero of X, and Q from the
matched 2:1 band (Z0 = R there), Q = 0.7071 times the geometric centre over the width (Yaghjian & Best 2005).

Run with Debian's python: /usr/bin/python3 tests/reference/nec_slope_q.py
"""
import json, math, pathlib, re, subprocess, tempfile
from scipy.interpolate import CubicSpline
from scipy.optimize import brentq

HERE = pathlib.Path(__file__).parent.parent / "fixtures/measurement/nec-q"
C = 299.792458

def dipole(length, radius, load=None):
    return [f"GW 1 101 0 0 {-length / 2:.5f} 0 0 {length / 2:.5f} {radius}", "GE 0"] + ([f"LD 0 1 51 51 0 {load:.6E} 0"] if load else []) + ["EX 0 1 51 0 1.0 0.0"]

def monopole(height, radius, load=None):
    return [f"GW 1 51 0 0 0 0 0 {height:.5f} {radius}", "GE 1"] + ([f"LD 0 1 1 1 0 {load:.6E} 0"] if load else []) + ["GN 1", "EX 0 1 1 0 1.0 0.0"]

def ground_plane(height, slope, count=4):
    lines = [f"GW 1 51 0 0 0 0 0 {height:.5f} 0.005"]
    for k in range(count):
        a = 2 * math.pi * k / count
        x, y = height * math.cos(slope) * math.cos(a), height * math.cos(slope) * math.sin(a)
        lines.append(f"GW {k + 2} 51 0 0 0 {x:.5f} {y:.5f} {-height * math.sin(slope):.5f} 0.001")
    return lines + ["GE 0", "EX 0 1 1 0 1.0 0.0"]

def vee(half, angle):
    x, z = half * math.cos(angle), -half * math.sin(angle)
    return [f"GW 1 50 {-x:.5f} 0 {z:.5f} -0.05 0 0 0.001", "GW 2 1 -0.05 0 0 0.05 0 0 0.001", f"GW 3 50 0.05 0 0 {x:.5f} 0 {z:.5f} 0.001",
            "GE 0", "EX 0 2 1 0 1.0 0.0"]

def square(perimeter):
    a = perimeter / 8
    return [f"GW 1 41 {-a:.5f} 0 {-a:.5f} {a:.5f} 0 {-a:.5f} 0.001", f"GW 2 41 {a:.5f} 0 {-a:.5f} {a:.5f} 0 {a:.5f} 0.001",
            f"GW 3 41 {a:.5f} 0 {a:.5f} {-a:.5f} 0 {a:.5f} 0.001", f"GW 4 41 {-a:.5f} 0 {a:.5f} {-a:.5f} 0 {-a:.5f} 0.001",
            "GE 0", "EX 0 1 21 0 1.0 0.0"]

# name: what it is, wires and cards, about where it resonates (MHz)
MODELS = {
    "dipole-thin": ("Dipole 10.14 m, wire radius 1 mm", dipole(10.14, 0.001), 14.3),
    "dipole-tube": ("Dipole 10.0 m, tube radius 20 mm", dipole(10.0, 0.02), 14.2),
    "dipole-finest": ("Dipole 20.3 m, wire radius 0.3 mm", dipole(20.3, 0.0003), 7.2),
    "dipole-loaded": ("Dipole 7.0 m, radius 2 mm, 3.0 uH in its middle", dipole(7.0, 0.002, 3.0e-6), 17.0),
    "monopole": ("Monopole 5.07 m over perfect ground, radius 5 mm", monopole(5.07, 0.005), 14.2),
    "monopole-mast": ("Monopole 10.0 m over perfect ground, radius 50 mm", monopole(10.0, 0.05), 7.1),
    "monopole-loaded": ("Monopole 6.0 m over perfect ground, radius 10 mm, 4.0 uH at its foot", monopole(6.0, 0.01, 4.0e-6), 8.5),
    "ground-plane": ("Ground plane 5.07 m, four level radials", ground_plane(5.07, 0), 14.7),
    "vee": ("Inverted vee, legs 10.3 m, falling 35 degrees", vee(10.3, math.radians(35)), 7.1),
    "loop": ("Square loop 21.8 m, fed in its lowest side", square(21.8), 14.3),
}

def run(cards, start, step, count, note):
    deck = "\n".join([f"CM {note}", "CE", *cards, f"FR 0 {count} 0 0 {start:.6f} {step:.6f}", "XQ 0", "EN"]) + "\n"
    with tempfile.TemporaryDirectory() as folder:
        source, out = pathlib.Path(folder, "a.nec"), pathlib.Path(folder, "a.out")
        source.write_text(deck)
        subprocess.run(["nec2c", "-i", source, "-o", out], check=True, stdout=subprocess.DEVNULL)
        text = out.read_text(errors="replace")
    rows = []
    for block in text.split("ANTENNA INPUT PARAMETERS")[1:]:
        for line in block.splitlines():
            cells = line.split()
            if len(cells) >= 11 and cells[0].isdigit():
                rows.append((round(start + len(rows) * step, 6), float(cells[6]), float(cells[7])))
                break
    assert len(rows) == count, (note, len(rows))
    return deck, rows

def resonance(rows):
    f, r, x = (CubicSpline([row[0] for row in rows], [row[k] for row in rows]) for k in range(3))
    ups = [(a[0], b[0]) for a, b in zip(rows, rows[1:]) if a[2] < 0 <= b[2]]
    zero = brentq(x, *ups[0])
    return zero, r, x

truth = {}
for name, (note, cards, near) in MODELS.items():
    _, rows = run(cards, near * 0.85, near * 0.01, 31, note)
    f0, r, x = resonance(rows)
    q = f0 / (2 * float(r(f0))) * math.hypot(float(r(f0, 1)), float(x(f0, 1)))
    step = max(0.001, round(f0 * 1.6 / q / 80, 3))
    deck, rows = run(cards, round(f0 - 40 * step, 3), step, 81, note)
    f0, r, x = resonance(rows)
    z0 = float(r(f0))
    q = f0 / (2 * z0) * math.hypot(float(r(f0, 1)), float(x(f0, 1)))
    def over(mhz):
        z = complex(float(r(mhz)), float(x(mhz)))
        return abs((z - z0) / (z + z0)) - 1 / 3
    low, high = brentq(over, rows[0][0], f0), brentq(over, f0, rows[-1][0])
    band = math.sqrt(0.5) * math.sqrt(low * high) / (high - low)
    truth[name] = {"note": note, "zeroMhz": round(f0, 6), "ohm": round(z0, 4), "slopeQ": round(q, 4), "bandQ": round(band, 4)}
    (HERE / f"{name}.nec").write_text(deck)
    (HERE / f"{name}.csv").write_text("mhz,ohm,reactance\n" + "".join(f"{a:g},{b:g},{c:g}\n" for a, b, c in rows))
    print(f"{name:18} f0 {f0:8.4f} MHz  R {z0:7.2f}  Q slope {q:7.3f}  Q band {band:7.3f}")
(HERE / "truth.json").write_text(json.dumps(truth, indent=1) + "\n")
