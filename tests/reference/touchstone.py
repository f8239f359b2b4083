#!/usr/bin/env python3
"""Reads the project's own Touchstone fixtures with scikit-rf and writes what it found, for the tests to compare with.

  /usr/bin/python3 tests/reference/touchstone.py

Needs Debian's python3-scikit-rf (0.15.4). Writes tests/fixtures/traces/gamma/touchstone.json: per file the reference
impedance of port 1 and every STEPth point as [Hz, Re S11, Im S11], full precision. Files of the network type Z or Y are
turned into S by scikit-rf's own conversion. What this version of scikit-rf can't read, or reads against the
specification, is named in SKIPPED with the reason.
"""
import glob, json, os, shutil, tempfile, warnings
import numpy as np

np.complex = complex  # this version of scikit-rf still uses the name that numpy has dropped
import skrf
from skrf.io.touchstone import Touchstone

warnings.simplefilter("ignore")
STEP = 7
HERE = os.path.dirname(os.path.abspath(__file__))
FOLDER = os.path.join(HERE, "..", "fixtures", "traces")
SKIPPED = {
    "odd-option-order.s1p": "option lines in another order are refused",
    "bom.s1p": "the byte order mark is taken for a number",
    "block-head.s1p": "the instrument's wrapper is no part of the format",
    "one-port-in.s2p": "the port count is taken from the name alone",
    "falling.s1p": "frequencies must rise",
    "latin1-cr.s1p": "lines that end with CR alone are not parted",
    "per-port-reference.s2p": "several references behind R are not known to this version",
    "version-2.ts": "version 2 files are read in part only",
    "version-2-z-ohm.ts": "version 2 files are read in part only",
    "version-2-lower.s2p": "version 2 files are read in part only",
    "two-option-lines.s1p": "takes the last option line, the specification the first",
}


def read(path):
    """Parameters as S at the file's reference, for Z and Y by conversion of the normalised matrix."""
    t = Touchstone(path)
    f, raw = t.get_sparameter_arrays()
    r = float(np.real(t.resistance))
    kind = t.parameter.lower()
    if kind == "s":
        return f, raw[:, 0, 0], r
    convert = {"z": skrf.z2s, "y": skrf.y2s}[kind]
    unit = np.ones((len(f), raw.shape[1]))
    # Version 1 data are normalised: a reference of 1 ohm stands for R.
    return f, convert(raw, unit)[:, 0, 0], r


out = {}
for path in sorted(glob.glob(os.path.join(FOLDER, "*.[sS][0-9][pP]"))):
    name = os.path.basename(path)
    if name in SKIPPED:
        continue
    with tempfile.TemporaryDirectory() as where:
        copy = os.path.join(where, name.lower())
        shutil.copy(path, copy)
        f, s11, r = read(copy)
    rows = [[float(f[i]), float(s11[i].real), float(s11[i].imag)] for i in range(0, len(f), STEP)]
    out[name] = {"ohm": r, "points": len(f), "rows": rows}
target = os.path.join(FOLDER, "gamma", "touchstone.json")
with open(target, "w") as file:
    json.dump({"about": f"scikit-rf {skrf.__version__}, made by tests/reference/touchstone.py", "files": out}, file, separators=(",", ":"))
print(len(out), "files in", target)
