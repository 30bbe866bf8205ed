"""Autocorrelations and cross-correlations by numpy's correlate, with holes as zero after centring.

Run: python make_look.py > look.json
"""
import json
import numpy as np

rng = np.random.default_rng(11)
T = 120
x = np.zeros(T)
y = np.zeros(T)
e, u = rng.standard_normal(T), rng.standard_normal(T)
for t in range(T):
    x[t] = (0.7 * x[t - 1] if t else 0) + e[t]
    y[t] = (0.5 * y[t - 1] if t else 0) + u[t] + (0.8 * x[t - 2] if t >= 2 else 0)
holes = [5, 6, 40, 77]
observed = y.copy()
observed[holes] = np.nan


def centred(v):
    return np.where(np.isnan(v), 0.0, v - np.nanmean(v))


def acf(v, most):
    c = centred(v)
    full = np.correlate(c, c, "full")
    return (full[T:T + most] / full[T - 1]).tolist()


def ccf(a, b, most):
    """Correlation of b in t with a in t - lag, lag -most..most."""
    ca, cb = centred(a), centred(b)
    full = np.correlate(cb, ca, "full")  # full[T-1+k] = sum_t cb[t+k] ca[t]
    return (full[T - 1 - most:T + most] / np.sqrt((ca**2).sum() * (cb**2).sum())).tolist()


most = 24
json.dump({"x": x.tolist(), "y": [None if np.isnan(v) else v for v in observed], "acfX": acf(x, most), "acfY": acf(observed, most), "ccf": ccf(x, observed, most)}, __import__("sys").stdout)
