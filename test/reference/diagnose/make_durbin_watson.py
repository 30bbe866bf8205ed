"""Fixture durbin_watson.json: P(d' < d) where periods are missing, by eigenvalues and Imhof's (1961) integral.

Terms: a constant and a step at 1899 over the years of base R's Nile set without 1890-1895 and 1930; a constant and a
trend over 40 rows in blocks of five. Eigenvalues in double precision (numpy), the integral by mpmath.
"""
import json
import mpmath as mp
import numpy as np

mp.mp.dps = 30


def lower(periods, X, d):
    T = len(periods)
    A = np.zeros((T, T))
    for t in range(1, T):
        if periods[t] - periods[t - 1] == 1:
            A[t, t] += 1
            A[t - 1, t - 1] += 1
            A[t, t - 1] -= 1
            A[t - 1, t] -= 1
    Q = np.linalg.qr(X, mode="complete")[0][:, X.shape[1]:]
    lam = [mp.mpf(float(v)) for v in np.linalg.eigvalsh(Q.T @ A @ Q) - d]

    def integrand(v):
        s = mp.e**v
        theta = sum(mp.atan(l * s) for l in lam) / 2
        rho = mp.e ** (sum(mp.log1p((l * s) ** 2) for l in lam) / 4)
        return mp.sin(theta) / rho

    h = mp.mpf("0.05")
    total = mp.fsum(integrand(-40 + h * i) for i in range(int(46 / h)))
    return float(mp.mpf("0.5") - total * h / mp.pi)


year = [y for y in range(1871, 1971) if not (1890 <= y <= 1895 or y == 1930)]
nile = np.column_stack([np.ones(len(year)), [1.0 if y >= 1899 else 0.0 for y in year]])
blocks = [7 * b + i for b in range(8) for i in range(5)]
trend = np.column_stack([np.ones(40), np.array(blocks, float)])
rows = []
for name, periods, X in (("nile", year, nile), ("blocks", blocks, trend)):
    for d in (0.9, 1.3, 1.6, 1.9, 2.2):
        rows.append([name, d, lower(periods, X, d)])
json.dump({"made": "make_durbin_watson.py", "years": year, "blocks": blocks, "rows": rows}, open("durbin_watson.json", "w"))
