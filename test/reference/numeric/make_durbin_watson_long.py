"""Writes durbin_watson_long.json: the law of the Durbin-Watson ratio for T = 100,000 rows and four columns (1, t/T, a slow
wave, a saw), in extended precision (numpy longdouble, 64 bits of mantissa), all nodes of the integral at once.
Run in this folder with numpy installed: python make_durbin_watson_long.py"""

import json

import numpy as np

real, cplx = np.longdouble, np.clongdouble
assert np.finfo(real).nmant >= 63
T = 100_000
t = np.arange(T)
X = np.column_stack([np.ones(T), t / T, np.sin(t * 0.001), (t * 37 % 101) / 101]).astype(real)
Q = X.copy()
for _ in range(2):
    for j in range(Q.shape[1]):
        for i in range(j):
            Q[:, j] -= Q[:, i] * np.sum(Q[:, i] * Q[:, j])
        Q[:, j] /= np.sqrt(np.sum(Q[:, j] ** 2))


def log_moment(d, z):
    """-1/2 log det of I - 2z(A - dI) on the complement of Q, for an array of z."""
    k = Q.shape[1]
    off = 2 * z
    pivot = 1 - 2 * z * (1 - d)
    y = np.repeat(Q[0][:, None].astype(cplx), len(z), axis=1)
    C = y[:, None] * y[None] / pivot
    total = np.log(pivot)
    for row in range(1, T):
        ratio = off / pivot
        pivot = 1 - 2 * z * ((1 if row == T - 1 else 2) - d) - ratio * off
        y = Q[row][:, None] - ratio * y
        C += y[:, None] * (y / pivot)
        total += np.log(pivot)
    for j in range(k):
        total += np.log(C[j, j])
        for i in range(j + 1, k):
            C[i] = C[i] - C[i, j] * C[j] / C[j, j]
    return -total / 2


def tail(d):
    side = -1 if d < 2 else 1
    # The saddle point of the independent case, exact enough: any centre on this side gives the same integral.
    grid = side * np.geomspace(1e-4, 0.24, 60).astype(real)
    height = np.real(log_moment(d, grid.astype(cplx))) - np.log(np.abs(grid))
    centre = grid[np.argmin(height)]
    scale = np.abs(centre) / 4 if abs(d - 2) > 0.02 else np.abs(centre)
    v = np.linspace(0, 9, 361).astype(real)
    y = scale * np.sinh(v)
    z = centre + 1j * y
    weight = scale * np.cosh(v)
    terms = np.real(np.exp(log_moment(d, z)) / z) * weight
    values = []
    for step in (1, 2):
        part = terms[::step]
        values.append((part.sum() - part[0] / 2) * (v[step] - v[0]) / np.pi)
    assert abs(values[0] / values[1] - 1) < 1e-14, values
    return float(abs(values[0]))


rows = []
for d in (1.99, 1.96, 1.94, 2.012, 2.05):
    rows.append({"d": d, "side": "lower" if d < 2 else "upper", "p": tail(d)})
    print(rows[-1])
with open("durbin_watson_long.json", "w") as file:
    json.dump({"T": T, "rows": rows}, file)
    file.write("\n")
