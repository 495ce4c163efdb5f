"""Writes solver/fermi-integral-coefficients.ts. For maintainers; needs Python 3 with mpmath.

Each cell [k, k + 1] of eta in [-2, 40] gets the polynomial of degree 13 through the Chebyshev points of the cell, in the variable
u = 2 (eta - k) - 1, computed with 50 digits from F_j(eta) = -Li_(j+1)(-exp(eta)).
"""
import sys
from mpmath import mp, mpf, polylog, exp, cos, pi, matrix, lu_solve, re

mp.dps = 50
LOW, HIGH, DEGREE = -2, 40, 13


def integral(j, eta):
    return re(-polylog(j + 1, -exp(eta)))


def cell(j, k):
    n = DEGREE + 1
    u = [cos(pi * (2 * i + 1) / (2 * n)) for i in range(n)]
    a = matrix(n, n)
    b = matrix(n, 1)
    for i in range(n):
        for m in range(n):
            a[i, m] = u[i] ** m
        b[i] = integral(j, k + (u[i] + 1) / 2)
    return [repr(float(c)) for c in lu_solve(a, b)]


out = ["/** Coefficients of fermi-integral.ts, made by test/tools/fermi-integral-coefficients.py: cells of width 1 from eta = -2 to 40, 14 each, lowest power of u = 2 (eta - k) - 1 first. */"]
for name, j in (("MINUS_HALF", mpf(-1) / 2), ("HALF", mpf(1) / 2), ("THREE_HALVES", mpf(3) / 2)):
    out.append(f"export const {name}_CELLS: Float64Array = Float64Array.of(")
    for k in range(LOW, HIGH):
        out.append("  " + ", ".join(cell(j, k)) + ",")
    out.append(");")
with open(sys.argv[1], "w") as f:
    f.write("\n".join(out) + "\n")
