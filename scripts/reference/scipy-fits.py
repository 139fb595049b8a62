"""Fits of stiff strings by scipy's general least squares, as values for the tests of lib/acoustics.

Run with Debian's python3-scipy:  /usr/bin/python3 scripts/reference/scipy-fits.py > tests/reference/scipy-fits.json
The sheets are invented (fixed seed); sigma is given in cents per reading.
"""

import json

import numpy as np
import scipy
from scipy import stats
from scipy.optimize import least_squares

CENTS = 1200 / np.log(2)


def inharmonic_cents(n, b):
    return 0.5 * CENTS * np.log((1 + b * n * n) / (1 + b))


def fit(n, hz, sigma):
    centre = np.log(hz[0] / n[0])

    def residuals(x):
        return (CENTS * (np.log(hz / n) - centre - x[0]) - inharmonic_cents(n, x[1] * 1e-4)) / sigma

    found = least_squares(residuals, [0.0, 1.0], method="lm", xtol=1e-15, ftol=1e-15, gtol=1e-15)
    covariance = np.linalg.inv(found.jac.T @ found.jac)
    return {
        "f1Hz": float(np.exp(found.x[0] + centre)),
        "f1SigmaCents": float(CENTS * np.sqrt(covariance[0, 0])),
        "b": float(found.x[1] * 1e-4),
        "bSigma": float(1e-4 * np.sqrt(covariance[1, 1])),
        "correlation": float(covariance[0, 1] / np.sqrt(covariance[0, 0] * covariance[1, 1])),
        "chi2": float(2 * found.cost),
    }


def main():
    random = np.random.default_rng(20260401)
    cases = []
    for midi, b, count in [
        (21, 3.1e-4, 12),
        (28, 1.9e-4, 12),
        (33, 9.1e-5, 10),
        (45, 8.5e-5, 12),
        (52, 1.4e-4, 9),
        (57, 2.2e-4, 10),
        (60, 3.0e-4, 8),
        (64, 4.4e-4, 7),
        (69, 6.5e-4, 8),
        (76, 1.2e-3, 6),
        (84, 2.4e-3, 6),
        (93, 5.5e-3, 5),
        (100, 1.0e-2, 4),
        (108, 2.2e-2, 3),
    ]:
        n = np.arange(1, count + 1, dtype=float)
        sigma = random.uniform(0.2, 1.5, count)
        f1 = 440 * 2 ** ((midi - 69) / 12) * 2 ** (random.normal(0, 15) / 1200)
        noise = np.clip(random.normal(0, 1, count), -1.8, 1.8) * sigma
        hz = n * f1 * np.exp((inharmonic_cents(n, b) + noise) / CENTS)
        readings = [
            {"partial": int(k), "hz": float(h), "sigmaCents": float(s)} for k, h, s in zip(n, hz, sigma)
        ]
        cases.append({"midi": midi, "readings": readings, "expected": fit(n, hz, sigma)})
    quantiles = [
        {"twoSided": p, "dof": dof, "t": float(stats.t.isf(p / 2, dof))}
        for p in (0.1, 0.05, 0.01, 1e-3, 1e-5)
        for dof in (1, 2, 3, 4.5, 7, 12, 30, 200)
    ]
    normal = [{"twoSided": p, "z": float(stats.norm.isf(p / 2))} for p in (0.3, 0.05, 0.01, 1e-3, 1e-6)]
    chi2 = [
        {"value": x, "dof": dof, "upperTail": float(stats.chi2.sf(x, dof))}
        for x in (0.1, 1, 4, 10, 40)
        for dof in (1, 2, 5, 10, 30)
    ]
    p_values = [0.001, 0.2, 0.013, 0.04, 0.9, 0.0004, 0.03, 0.6, 0.011]
    order = np.argsort(p_values)
    scaled = np.array(p_values)[order] * len(p_values) / np.arange(1, len(p_values) + 1)
    adjusted = np.empty(len(p_values))
    adjusted[order] = np.minimum(1, np.minimum.accumulate(scaled[::-1])[::-1])
    print(
        json.dumps(
            {
                "note": f"scripts/reference/scipy-fits.py, scipy {scipy.__version__}; the sheets are invented",
                "fits": cases,
                "studentQuantiles": quantiles,
                "normalQuantiles": normal,
                "chiSquareTails": chi2,
                "adjustedPValues": {"pValues": p_values, "adjusted": adjusted.tolist()},
            },
            indent=1,
        )
    )


main()
