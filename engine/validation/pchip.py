"""
Values of SciPy's PchipInterpolator on tables of many shapes, as JSON for `pchip.test.ts`.

    /usr/bin/python3 pchip.py > pchip.expected.json

SciPy 1.10.1 (Debian `python3-scipy`).
"""

import json

import numpy as np
from scipy.interpolate import PchipInterpolator

TABLES = {
    "entropic, crosses zero twice": ([0, 0.1, 0.2, 0.35, 0.5, 0.65, 0.8, 1], [-0.32, -0.2, -0.12, 0.02, 0.07, 0.01, -0.04, -0.07]),
    "monotone with a knee": ([0, 0.02, 0.05, 0.1, 0.5, 0.9, 1], [2.5, 3.0, 3.2, 3.3, 3.6, 4.0, 4.2]),
    "flat stretch": ([0, 0.2, 0.4, 0.6, 1], [1, 2, 2, 2, 3]),
    "end slope set to zero": ([0, 0.1, 0.2, 1], [0, 0.01, 1, 1.01]),
    "end slope held to three secants": ([0, 0.5, 0.6, 1], [0, 0.05, -1, 2]),
    "peak and trough, uneven": ([0, 0.03, 0.3, 0.31, 0.7, 1], [0, 5, -1, -2, 4, 3.5]),
    "two rows": ([0.2, 0.9], [3.1, 4.0]),
    "three rows": ([0, 0.3, 1], [1, 3, 2]),
}
cases = []
for name, (x, y) in TABLES.items():
    curve = PchipInterpolator(x, y)
    at = np.linspace(x[0], x[-1], 29)
    cases.append(dict(name=name, x=x, y=y, at=at.tolist(), value=curve(at).tolist(),
                      area=[float(curve.integrate(x[0], a)) for a in at]))
print(json.dumps(cases))
