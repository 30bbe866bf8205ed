"""Fixture kolmogorov.json: P(D_n > d) of the two-sided Kolmogorov-Smirnov distance of n uniforms.

From the boundary-crossing recursion of Steck/Noe in the form of Durbin's matrix, in 80-digit arithmetic (mpmath), with the
upper tail taken as 1 - P at full precision. n = 5000 and 49999 from scipy.stats.kstwo.sf (double precision).
"""
import json
import mpmath as mp
from scipy.stats import kstwo

mp.mp.dps = 80


def upper(n, d):
    d = mp.mpf(d)
    k = int(mp.floor(n * d)) + 1
    m, h = 2 * k - 1, k - n * d
    H = mp.matrix(m, m)
    for i in range(m):
        for j in range(m):
            if i - j + 1 >= 0:
                H[i, j] = mp.mpf(1)
    for i in range(m):
        H[i, 0] -= h ** (i + 1)
        H[m - 1, i] -= h ** (m - i)
    if 2 * h - 1 > 0:
        H[m - 1, 0] += (2 * h - 1) ** m
    for i in range(m):
        for j in range(m):
            if i - j + 1 > 0:
                H[i, j] /= mp.factorial(i - j + 1)
    return 1 - (H ** n)[k - 1, k - 1] * mp.factorial(n) / mp.mpf(n) ** n


rows = []
for n in (5, 10, 24, 48, 100, 140, 141, 300):
    for z in (0.4, 0.7, 1.0, 1.358, 1.63, 2.05, 2.6):
        d = z / n**0.5
        if 0.5 / n < d < 1:
            rows.append([n, d, float(upper(n, d)), "mpmath"])
for n in (5000, 49999):
    for z in (0.4, 0.7, 1.0, 1.358, 1.63, 2.05, 3.0):
        d = z / n**0.5
        rows.append([n, d, float(kstwo.sf(d, n)), "scipy"])
json.dump({"made": "make_kolmogorov.py", "columns": ["n", "d", "upper", "by"], "rows": rows}, open("kolmogorov.json", "w"))
