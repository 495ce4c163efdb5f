"""Writes solver/fermi-integral-coefficients.ts. For maintainers; needs Python 3 with mpmath; takes some minutes.

All polynomials go through Chebyshev points, are computed with 40 digits from F_j(eta) = -Li_(j+1)(-exp(eta)), and are given lowest power first.

- Cells: [k, k + 1] of eta in [-2, 40], degree 13 in u = 2 (eta - k) - 1.
- Tails: F_j = t + t^2 P(t), t = exp(eta), P of degree 10 on t in [0, exp(-2)].
- Inverse of F_1/2: cells of y = F_1/2 that split each binade of [2^-3, 2^8] into eight, so that a cell's number is read off the bits of y;
  eta of degree 10 in u, which runs from -1 to 1 through the cell. Below, eta = ln y + y Q(y), Q of degree 10 on [0, 1/8]. Above, eta = w + R(v)/w with
  w = (3 sqrt(pi) y/4)^(2/3), v = 1/w^2, R of degree 5.
"""
import sys
from mpmath import mp, mpf, polylog, exp, cos, gamma, log, pi, matrix, lu_solve, re, sqrt

mp.dps = 40
LOW, HIGH, DEGREE = -2, 40, 13
INVERSE_LOW, INVERSE_HIGH, SPLIT, INVERSE_DEGREE = -3, 8, 8, 10


def integral(j, eta):
    return re(-polylog(j + 1, -exp(eta)))


def fitted(f, low, high, degree, local):
    """Coefficients in u of [-1, 1] (local) or in the variable itself."""
    n = degree + 1
    a = matrix(n, n)
    b = matrix(n, 1)
    for i in range(n):
        u = cos(pi * (2 * i + 1) / (2 * n))
        x = mpf(low) + (u + 1) / 2 * (mpf(high) - low)
        for m in range(n):
            a[i, m] = (u if local else x) ** m
        b[i] = f(x)
    return [repr(float(c)) for c in lu_solve(a, b)]


def tail(j):
    """(F/t - 1)/t as its own series, which loses nothing at small t."""
    return lambda t: sum((-1) ** k * t ** (k - 1) / mpf(k + 1) ** (j + 1) for k in range(1, 60))


def inverse(y):
    """Newton in ln F from a crude start; quadratic, so the last step shows that it has settled."""
    half = mpf(1) / 2
    w = (3 * sqrt(pi) * y / 4) ** (mpf(2) / 3)
    eta = log(y) + y / sqrt(8) if y < 1.5 else w - pi ** 2 / (12 * w)
    for _ in range(60):
        f = integral(half, eta)
        step = f / integral(-half, eta) * (log(f) - log(y))
        eta -= step
        if abs(step) < mpf(10) ** -22:
            return eta
    raise ArithmeticError(y)


def sommerfeld_half(eta):
    """F_1/2 above 45 without polylogarithms: asymptotic series to its smallest term (Dingle 1957); what it leaves out is below exp(-45)."""
    total, falling, k = mpf(1), mpf(1), 1
    last = mpf(1)
    j = mpf(1) / 2
    while True:
        falling *= (j + 3 - 2 * k) * (j + 2 - 2 * k)
        term = 2 * mp.altzeta(2 * k) * falling / eta ** (2 * k)
        if abs(term) >= abs(last) or abs(term) < mpf(10) ** -38:
            break
        total += term
        last, k = term, k + 1
    return eta ** (j + 1) / gamma(j + 2) * total


def inverse_high(v):
    """R(v) = (eta - w) w by bisection-free Newton on the asymptotic form."""
    w = 1 / sqrt(v)
    y = 4 * w ** (mpf(3) / 2) / (3 * sqrt(pi))
    eta = w - pi ** 2 / (12 * w)
    for _ in range(60):
        step = (sommerfeld_half(eta) - y) / (2 / sqrt(pi) * sqrt(eta))
        eta -= step
        if abs(step) < mpf(10) ** -34:
            return (eta - w) * w
    raise ArithmeticError(v)


def table(name, rows):
    out.append(f"export const {name}: Float64Array = Float64Array.of(")
    for row in rows:
        out.append("  " + ", ".join(row) + ",")
    out.append(");")


out = [
    "/**",
    " * Coefficients of fermi-integral.ts, made by test/tools/fermi-integral-coefficients.py, lowest power first.",
    " * ..._CELLS: cells of width 1 from eta = -2 to 40, 14 each, in u = 2 (eta - k) - 1. ..._TAIL: P of F = t + t^2 P(t), t = exp(eta).",
    " * INVERSE_CELLS: eight cells a binade from y = 1/8 to 256, 11 each; INVERSE_LOW: Q of eta = ln y + y Q(y); INVERSE_HIGH: R of eta = w + R(1/w^2)/w.",
    " */",
]
for name, j in (("MINUS_HALF", mpf(-1) / 2), ("HALF", mpf(1) / 2), ("THREE_HALVES", mpf(3) / 2)):
    table(f"{name}_CELLS", [fitted(lambda eta: integral(j, eta), k, k + 1, DEGREE, True) for k in range(LOW, HIGH)])
    table(f"{name}_TAIL", [fitted(tail(j), 0, exp(mpf(-2)), 10, False)])
cells = []
for e in range(INVERSE_LOW, INVERSE_HIGH):
    for m in range(SPLIT):
        low = mpf(2) ** e * (1 + mpf(m) / SPLIT)
        cells.append(fitted(inverse, low, low + mpf(2) ** e / SPLIT, INVERSE_DEGREE, True))
table("INVERSE_CELLS", cells)
table("INVERSE_LOW", [fitted(lambda y: (inverse(y) - log(y)) / y, 0, mpf(1) / 8, 10, False)])
highest = (4 / (3 * sqrt(pi) * 256)) ** (mpf(4) / 3)
table("INVERSE_HIGH", [fitted(inverse_high, 0, highest, 5, False)])
with open(sys.argv[1], "w") as f:
    f.write("\n".join(out) + "\n")
