#!/usr/bin/python3
"""Least total costs by SciPy's linear_sum_assignment: writes tests/fixtures/measurement/assignment.json.

Debian package python3-scipy. Costs are multiples of 1/64, so that sums are exact whatever the order; a forbidden pair is null.
"""
import json, os
import numpy as np
from scipy.optimize import linear_sum_assignment

OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "fixtures", "measurement", "assignment.json")
draw = np.random.default_rng(20261201)
cases = []
while len(cases) < 60:
    rows = int(draw.integers(1, 9))
    columns = rows + int(draw.integers(0, 6))
    cost = draw.integers(0, 40 if len(cases) % 2 else 400, (rows, columns)) / 64
    cost[draw.random((rows, columns)) < (0.25 if len(cases) % 3 else 0.6)] = np.inf
    try:
        r, c = linear_sum_assignment(cost)
        total = float(cost[r, c].sum())
    except ValueError:
        total = None
    cases.append({"cost": [[None if np.isinf(v) else v for v in row] for row in cost.tolist()], "total": total})
json.dump(cases, open(OUT, "w"), separators=(",", ":"))
print(len(cases), "cases,", sum(c["total"] is None for c in cases), "without an answer")
