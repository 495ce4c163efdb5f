"""Writes test/fixtures/fermi-dirac-tails.json. For maintainers; needs Python 3 with mpmath.

F_j(eta) by direct quadrature of the defining integral with t = s^2, which takes the root out at s = 0. Below eta = 0 the factor exp(eta) is
taken out first: quadrature stops at an absolute error, and an integrand of 1e-300 would pass as zero.
"""
import json
import sys
from mpmath import exp, gamma, mp, mpf, nstr, quad, sqrt

mp.dps = 40


def integral(j, eta):
    eta = mpf(eta)
    if eta < 0:
        return exp(eta) * quad(lambda s: 2 * s ** (2 * j + 1) * exp(-s * s) / (1 + exp(eta - s * s)), [0, 1, 2, 4, 8, 14]) / gamma(j + 1)
    centre = sqrt(eta)
    width = 1 / (2 * centre)
    points = [0, centre / 2, centre - 60 * width] + [centre + k * width for k in (-30, -15, -8, -4, -2, 0, 2, 4, 8, 15, 30, 60, 100)]
    return quad(lambda s: 2 * s ** (2 * j + 1) / (1 + exp(s * s - eta)), points, maxdegree=10) / gamma(j + 1)


rows = [{"eta": str(eta), **{name: nstr(integral(mpf(j), eta), 20) for name, j in (("-1/2", "-0.5"), ("1/2", "0.5"), ("3/2", "1.5"))}} for eta in (-700, -300, -100, -60, 600, 1000, 10000)]
what = "F_j(eta), normalised by Gamma(j+1), by direct quadrature of the defining integral with 40 digits (test/tools/fermi-integral-tails.py)"
with open(sys.argv[1], "w") as f:
    f.write(json.dumps({"what": what, "rows": rows}, indent=1) + "\n")
