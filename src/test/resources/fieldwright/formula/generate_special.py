"""Writes special-mpmath.csv: values of the special functions, mpmath 1.3.0 at 50 digits, printed with 20.

The arguments are doubles; mpmath sees their exact values. Run: python3 generate_special.py > special-mpmath.csv
"""
import random
from mpmath import mp, mpf, besselj, bessely, besseli, besselk, gamma, erf, erfc, legendre, ellipk, ellipe, ellipf, ellippi, digamma, pi

mp.dps = 50
random.seed(20260314)
rows = []


def row(name, value, *args):
    rows.append("%s,%s,%s" % (name, " ".join(repr(a) for a in args), mp.nstr(value, 20, min_fixed=0, max_fixed=0)))


def sweep(low, high, n):
    """Doubles spread evenly in the logarithm."""
    return [low * (high / low) ** (i / (n - 1)) for i in range(n)]


for n in (0, 1, 2, 5, 12):
    for x in sweep(1e-3, 900, 40) + [24.9, 25.0, 25.1, 2.404825557695773, 0.8935769662791675, 14.9, 30.0]:
        row("besselJ", besselj(n, mpf(x)), float(n), x)
        row("besselY", bessely(n, mpf(x)), float(n), x)
    for x in sweep(1e-3, 690, 40) + [0.999, 1.0, 1.001, 39.9, 40.0, 40.1]:
        row("besselI", besseli(n, mpf(x)), float(n), x)
        row("besselK", besselk(n, mpf(x)), float(n), x)
for x in sweep(1e-8, 170, 60) + [-0.5, -1.5, -2.25, -10.7]:
    row("gamma", gamma(mpf(x)), x)
for x in sweep(1e-3, 100, 25):
    row("digamma", digamma(mpf(x)), x)
for x in sweep(1e-10, 5.5, 40) + [0.499, 0.5, 0.501]:
    row("erf", erf(mpf(x)), x)
    row("erf", erf(mpf(-x)), -x)
for x in sweep(1e-3, 20, 25):
    row("erfc", erfc(mpf(x)), x)
for n in (0, 1, 2, 3, 7, 20):
    for x in (-1.0, -0.9, -0.3, 0.0, 0.1, 0.57, 0.99, 1.0, 1.5, 3.0):
        row("legendreP", legendre(n, mpf(x)), float(n), x)
ms = [-1e6, -37.5, -1.0, -1e-9, 0.0, 1e-12, 0.1, 0.5, 0.8, 0.99, 0.999999, 1 - 2.0 ** -40]
for m in ms:
    row("ellipticK_m", ellipk(mpf(m)), m)
    row("ellipticE_m", ellipe(mpf(m)), m)
    for n in (-100.0, -1.5, -0.2, 0.3, 0.9, 0.999):
        row("ellipticPi_m", ellippi(mpf(n), mpf(m)), n, m)
    for phi in (1e-6, 0.2, 1.0, 1.5, 1.5707, 2.0, 4.0, 10.0, -2.5):
        row("ellipticF_m", ellipf(mpf(phi), mpf(m)), phi, m)
        row("ellipticE_m", ellipe(mpf(phi), mpf(m)), phi, m)
        for n in (-100.0, -1.5, 0.3, 0.9):
            row("ellipticPi_m", ellippi(mpf(n), mpf(phi), mpf(m)), n, phi, m)
print("# Origin: own values, not published; generate_special.py beside this file, mpmath 1.3.0 at 50 digits. Columns: function, arguments, value.")
print("\n".join(rows))
