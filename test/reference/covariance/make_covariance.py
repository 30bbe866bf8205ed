"""Fixtures of the covariance room, by other roads than its own.

Standard errors in 40-digit arithmetic straight from the definitions: lag loops over T x k scores, no orthonormal basis,
no moving sums, no transform. Bandwidth rules likewise. Fixed-b laws in double precision from all T eigenvalues of
M (ww' o K) M (numpy) and Craig's integral by scipy's adaptive quadrature; laws under AR(1) errors from all
eigenvalues of L'HL. Needs numpy, scipy, mpmath.

    python test/reference/covariance/make_covariance.py
"""
import csv
import json
import os

import mpmath as mp
import numpy as np
from scipy import integrate, optimize

mp.mp.dps = 40
HERE = os.path.dirname(os.path.abspath(__file__))
KERNELS = ["truncated", "bartlett", "parzen", "tukey-hanning", "quadratic spectral", "daniell"]
CONSTANT = {"truncated": "0.6611", "bartlett": "1.1447", "parzen": "2.6614", "tukey-hanning": "1.7462",
            "quadratic spectral": "1.3221", "daniell": "1.4017"}
PRE = {"bartlett": (2, 9), "parzen": (4, 25), "quadratic spectral": (2, 25)}


def weight(name, x):
    x = mp.mpf(x)
    if x == 0:
        return mp.mpf(1)
    if name == "truncated":
        return mp.mpf(1) if x <= 1 else mp.mpf(0)
    if name == "bartlett":
        return max(1 - x, mp.mpf(0))
    if name == "parzen":
        if x <= mp.mpf(1) / 2:
            return 1 - 6 * x ** 2 + 6 * x ** 3
        return 2 * (1 - x) ** 3 if x <= 1 else mp.mpf(0)
    if name == "tukey-hanning":
        return (1 + mp.cos(mp.pi * x)) / 2 if x <= 1 else mp.mpf(0)
    if name == "quadratic spectral":
        d = 6 * mp.pi * x / 5
        return 3 / d ** 2 * (mp.sin(d) / d - mp.cos(d))
    return mp.sin(mp.pi * x) / (mp.pi * x)


def design(name):
    """An invented regression: T rows, regressors, outcome, all doubles."""
    rng = np.random.default_rng({"ill-conditioned": 11, "plain": 12}[name])
    T = 60 if name == "ill-conditioned" else 48
    t = np.arange(1, T + 1, dtype=float)
    if name == "ill-conditioned":
        # Powers of a year count from a far origin: scaled condition number 1e6.
        year = 1960 + t / 4
        X = np.column_stack([np.ones(T), year, year ** 2, rng.standard_normal(T).cumsum()])
    else:
        X = np.column_stack([np.ones(T), rng.standard_normal(T).cumsum(), (t > 30).astype(float)])
    u = np.zeros(T)
    for i in range(T):
        u[i] = 0.6 * (u[i - 1] if i else 0) + rng.standard_normal()
    y = 3 + X[:, -1] + 0.2 * X[:, 1] + u
    return X, y


def matrix(rows):
    return mp.matrix([[mp.mpf(float(v)) for v in row] for row in rows])


def least_squares(X, y):
    A, b = matrix(X), mp.matrix([mp.mpf(float(v)) for v in y])
    mp.mp.dps = 80
    B = (A.T * A) ** -1
    beta = B * (A.T * b)
    e = b - A * beta
    mp.mp.dps = 40
    return A, B, beta, e


def lagged(v, j):
    T, k = v.rows, v.cols
    G = mp.matrix(k, k)
    for t in range(j, T):
        for a in range(k):
            for b in range(k):
                G[a, b] += v[t, a] * v[t - j, b]
    return G


def hac_sum(v, name, S, cache):
    T, k = v.rows, v.cols
    total = mp.matrix(k, k)
    for j in range(T):
        w = weight(name, mp.mpf(j) / S) if j else mp.mpf(1)
        if w == 0:
            continue
        if j not in cache:
            cache[j] = lagged(v, j)
        total += w * cache[j] if j == 0 else w * (cache[j] + cache[j].T)
    return total


def andrews(v, name, intercept):
    T, k = v.rows, v.cols
    top1 = top2 = low = mp.mpf(0)
    for a in range(k):
        if a == intercept and k > 1:
            continue
        c = [v[t, a] for t in range(T)]
        rho = sum(c[t] * c[t - 1] for t in range(1, T)) / sum(c[t - 1] ** 2 for t in range(1, T))
        s2 = sum((c[t] - rho * c[t - 1]) ** 2 for t in range(1, T)) / (T - 1)
        rho = max(min(rho, mp.mpf("0.97")), -mp.mpf("0.97"))
        top1 += 4 * rho ** 2 * s2 ** 2 / ((1 - rho) ** 6 * (1 + rho) ** 2)
        top2 += 4 * rho ** 2 * s2 ** 2 / (1 - rho) ** 8
        low += s2 ** 2 / (1 - rho) ** 4
    q = 1 if name == "bartlett" else 2
    alpha = (top1 if q == 1 else top2) / low
    return mp.mpf(CONSTANT[name]) * (alpha * T) ** (mp.mpf(1) / (2 * q + 1))


def newey_west_1994(v, name, intercept):
    T, k = v.rows, v.cols
    h = [sum(v[t, a] for a in range(k) if a != intercept or k == 1) for t in range(T)]
    p = mp.mpf(PRE[name][0]) / PRE[name][1]
    n = int(mp.floor(4 * (mp.mpf(T) / 100) ** p))
    q = 1 if name == "bartlett" else 2
    sigma = [sum(h[t] * h[t - j] for t in range(j, T)) / T for j in range(n + 1)]
    s0 = sigma[0] + 2 * sum(sigma[1:])
    sq = 2 * sum(mp.mpf(j) ** q * sigma[j] for j in range(1, n + 1))
    real = mp.mpf(CONSTANT[name]) * ((sq / s0) ** 2) ** (mp.mpf(1) / (2 * q + 1)) * mp.mpf(T) ** (mp.mpf(1) / (2 * q + 1))
    return real if name == "quadratic spectral" else mp.floor(real) + 1


def prewhitened(v):
    """Unbounded VAR(1); the fixture's designs need no bound (checked on standardised scores below)."""
    T, k = v.rows, v.cols
    cross, past = mp.matrix(k, k), mp.matrix(k, k)
    for t in range(1, T):
        for a in range(k):
            for b in range(k):
                cross[a, b] += v[t, a] * v[t - 1, b]
                past[a, b] += v[t - 1, a] * v[t - 1, b]
    A = cross * past ** -1
    u = mp.matrix(T - 1, k)
    for t in range(1, T):
        for a in range(k):
            u[t - 1, a] = v[t, a] - sum(A[a, b] * v[t - 1, b] for b in range(k))
    V = np.array([[float(x) for x in v[t, :]] for t in range(T)])
    root = np.linalg.cholesky(V.T @ V / T)
    standard = np.linalg.solve(root, np.array(A.tolist(), dtype=float)) @ root
    return A, u, float(np.linalg.svd(standard)[1][0])


def errors(B, S, factor):
    V = B * S * B
    return [None if V[a, a] <= 0 else float(mp.sqrt(factor * V[a, a])) for a in range(B.rows)]


def standard_errors(name):
    X, y = design(name)
    A, B, beta, e = least_squares(X, y)
    T, k = A.rows, A.cols
    c = mp.mpf(T) / (T - k)
    v = mp.matrix(T, k)
    for t in range(T):
        for a in range(k):
            v[t, a] = A[t, a] * e[t]
    h = [(A[t, :] * B * A[t, :].T)[0] for t in range(T)]
    out = {"X": X.T.tolist(), "y": y.tolist(), "coefficients": [float(b) for b in beta]}
    scaled = X / np.sqrt((X ** 2).sum(0))
    out["condition"] = float(np.linalg.cond(scaled))
    s2 = sum(x ** 2 for x in e) / (T - k)
    out["classical"] = [float(mp.sqrt(s2 * B[a, a])) for a in range(k)]
    omega = {"HC0": lambda t: 1, "HC1": lambda t: c, "HC2": lambda t: 1 / (1 - h[t]), "HC3": lambda t: 1 / (1 - h[t]) ** 2,
             "HC4": lambda t: (1 - h[t]) ** -min(4, T * h[t] / k)}
    for kind, w in omega.items():
        S = mp.matrix(k, k)
        for t in range(T):
            S += w(t) * (v[t, :].T * v[t, :])
        out[kind] = errors(B, S, 1)
    cache = {}
    _, u, largest = prewhitened(v)
    D = (mp.eye(k) - prewhitened(v)[0]) ** -1
    white_cache = {}
    out["largest_singular_value"] = largest
    assert largest < 0.97
    cases = []
    for kernel in KERNELS:
        rules = {"3.5": mp.mpf("3.5"), "12": mp.mpf(12), "andrews": andrews(v, kernel, 0),
                 "square-root": mp.ceil(mp.mpf("1.3") * mp.sqrt(T)), "cube-root": mp.mpf("0.75") * mp.cbrt(T)}
        if kernel in PRE:
            rules["newey-west"] = newey_west_1994(v, kernel, 0)
        for rule, S in rules.items():
            cases.append({"kernel": kernel, "rule": rule, "prewhiten": False, "bandwidth": float(S),
                          "se": errors(B, hac_sum(v, kernel, S, cache), c)})
        rules = {"4": mp.mpf(4), "andrews": andrews(u, kernel, 0)}
        if kernel in PRE:
            rules["newey-west"] = newey_west_1994(u, kernel, 0)
        for rule, S in rules.items():
            inner = hac_sum(u, kernel, S, white_cache)
            cases.append({"kernel": kernel, "rule": rule, "prewhiten": True, "bandwidth": float(S),
                          "se": errors(B, D * inner * D.T, c * mp.mpf(T) / (T - 1))})
    out["hac"] = cases
    cosines = {}
    for nu in (4, 9):
        S = mp.matrix(k, k)
        for j in range(1, nu + 1):
            L = mp.matrix(1, k)
            for t in range(T):
                L += mp.sqrt(mp.mpf(2) / T) * mp.cos(mp.pi * j * (t + mp.mpf(1) / 2) / T) * v[t, :]
            S += L.T * L
        cosines[nu] = errors(B, S * T / nu, c)
    out["cosines"] = cosines
    groups = {}
    for length in (6, 8):
        G = int(round(T / length))
        S = mp.matrix(k, k)
        for g in range(G):
            H = mp.matrix(1, k)
            for t in range(g * T // G, (g + 1) * T // G):
                H += v[t, :]
            S += H.T * H
        groups[length] = errors(B, S * G / (G - 1), 1)
    out["batches"] = groups
    # Periods 20..24 taken out: lags in time, zero scores where nothing was observed.
    keep = [t for t in range(T) if not 20 <= t < 25]
    _, B2, _, e2 = least_squares(X[keep], y[keep])
    gappy = mp.matrix(T, k)
    for i, t in enumerate(keep):
        for a in range(k):
            gappy[t, a] = mp.mpf(float(X[t, a])) * e2[i]
    c2 = mp.mpf(len(keep)) / (len(keep) - k)
    gap_cache = {}
    out["gaps"] = {"kept": keep, "cases": [
        {"kernel": kernel, "bandwidth": 7.25, "se": errors(B2, hac_sum(gappy, kernel, mp.mpf("7.25"), gap_cache), c2)}
        for kernel in ("bartlett", "parzen", "quadratic spectral")]}
    return out


def double_weight(name, x):
    x = np.abs(x)
    if name == "bartlett":
        return np.maximum(1 - x, 0)
    if name == "parzen":
        return np.where(x <= 0.5, 1 - 6 * x ** 2 + 6 * x ** 3, np.where(x <= 1, 2 * (1 - np.minimum(x, 1)) ** 3, 0))
    if name == "daniell":
        return np.sinc(x)
    d = np.where(x == 0, 1.0, 6 * np.pi * x / 5)
    return np.where(x == 0, 1.0, 3 / d ** 2 * (np.sin(d) / d - np.cos(d)))


def craig(c, lam):
    f = lambda phi: np.exp(-0.5 * np.log1p(c * c * lam / np.sin(phi) ** 2).sum())
    return 2 / np.pi * integrate.quad(f, 0, np.pi / 2, epsabs=1e-13, epsrel=1e-11, limit=400)[0]


def critical(tail, alpha):
    return optimize.brentq(lambda c: tail(c) - alpha, 1e-3, 400, xtol=1e-10)


def law_design(kind, T, k, seed):
    rng = np.random.default_rng(seed)
    t = np.arange(T)
    columns = [np.ones(T)]
    for j in range(1, k):
        e = rng.standard_normal(T)
        if kind == "stationary":
            x = np.zeros(T)
            for i in range(T):
                x[i] = 0.8 * (x[i - 1] if i else 0) + e[i]
        elif kind == "random walk":
            x = e.cumsum()
        elif kind == "trend":
            x = (2 * t / (T - 1) - 1.0) ** j
        elif kind == "step":
            x = (t >= T * j // k).astype(float)
        else:
            x = (t % k == j).astype(float)
        columns.append(x)
    return np.column_stack(columns)


def pieces(X, a, name, S):
    T = X.shape[0]
    Q, R = np.linalg.qr(X)
    w = Q @ np.linalg.solve(R.T, np.eye(X.shape[1])[a])
    w /= np.linalg.norm(w)
    M = np.eye(T) - Q @ Q.T
    i = np.arange(T)
    K = double_weight(name, (i[:, None] - i[None, :]) / S)
    return w, M @ (w[:, None] * K * w[None, :]) @ M


def own_design_laws():
    out = []
    for kind, T, k in (("stationary", 60, 4), ("random walk", 60, 4), ("trend", 60, 3), ("season", 120, 6),
                       ("step", 150, 4), ("stationary", 200, 6), ("random walk", 200, 5), ("trend", 300, 3)):
        X = law_design(kind, T, k, T + k)
        for name, S in (("bartlett", 5), ("bartlett", int(np.ceil(1.3 * np.sqrt(T)))), ("bartlett", 7.3), ("bartlett", T),
                        ("parzen", 14), ("quadratic spectral", 4.5), ("daniell", 4.5)):
            _, A = pieces(X, 1, name, S)
            lam = np.clip(np.linalg.eigvalsh(A), 0, None)
            tail = lambda c: craig(c, lam)
            out.append({"design": kind, "T": T, "k": k, "kernel": name, "bandwidth": S,
                        "critical": {str(level): critical(tail, 1 - level) for level in (0.9, 0.95, 0.99)},
                        "p": {str(c): tail(c) for c in (1.0, 2.0, 3.0, 5.0)}})
        out[-1]["X"] = X.T.tolist()
    return out


def calibrated_laws():
    out = []
    for kind, T, k in (("stationary", 80, 3), ("trend", 80, 3), ("random walk", 120, 4)):
        X = law_design(kind, T, k, T + k)
        S = int(np.ceil(1.3 * np.sqrt(T)))
        w, A = pieces(X, 1, "bartlett", S)
        for rho in (0.0, 0.4, 0.8, 0.95, -0.4):
            i = np.arange(T)
            L = np.linalg.cholesky(rho ** np.abs(i[:, None] - i[None, :]) if rho else np.eye(T))

            def miss(c):
                lam = np.linalg.eigvalsh(L.T @ (np.outer(w, w) - c * c * A) @ L)
                return craig(1, np.clip(-lam[:-1] / lam[-1], 0, None))

            out.append({"design": kind, "T": T, "k": k, "rho": rho, "bandwidth": S, "critical": critical(miss, 0.05),
                        "miss": {str(c): miss(c) for c in (1.0, 2.0, 3.0)}})
        out[-1]["X"] = X.T.tolist()
    return out


def limit_laws():
    """The limit on grids of 1,000 and 2,000 points, extrapolated in N^-2."""
    out = []
    for name in ("bartlett", "parzen", "quadratic spectral", "daniell"):
        for b in (0.02, 0.0955, 0.3, 0.7, 1.0):
            values = []
            for N in (1000, 2000):
                i = np.arange(N)
                K = double_weight(name, (i[:, None] - i[None, :]) / (b * N)) / N
                K -= K.mean(0)
                K -= K.mean(1)[:, None]
                lam = np.clip(np.linalg.eigvalsh(K), 0, None)
                lam = lam[lam > 1e-15]
                values.append([critical(lambda c: craig(c, lam), 1 - level) for level in (0.9, 0.95, 0.99)])
            out.append({"kernel": name, "b": b,
                        "critical": [(4 * f - g) / 3 for g, f in zip(*values)]})
    return out


def reml(X, y):
    """AR(1) coefficient by restricted likelihood, dense matrices."""
    T, k = X.shape
    i = np.arange(T)

    def criterion(rho):
        W = np.linalg.inv(rho ** np.abs(i[:, None] - i[None, :]) / (1 - rho * rho))
        XtW = X.T @ W
        G = XtW @ X
        r = y - X @ np.linalg.solve(G, XtW @ y)
        return (T - k) * np.log(r @ W @ r) - np.log(1 - rho * rho) + np.linalg.slogdet(G)[1]

    return optimize.minimize_scalar(criterion, bounds=(-0.99, 0.99), method="bounded", options={"xatol": 1e-10}).x


def lake_huron():
    with open(os.path.join(HERE, "lakehuron_trend.design.csv")) as f:
        rows = list(csv.DictReader(f))
    X = np.array([[float(r["x1"]), float(r["x2"])] for r in rows])
    y = np.array([float(r["y"]) for r in rows])
    return reml(X, y)


if __name__ == "__main__":
    out = {
        "designs": {name: standard_errors(name) for name in ("ill-conditioned", "plain")},
        "own_design_laws": own_design_laws(),
        "calibrated_laws": calibrated_laws(),
        "limit_laws": limit_laws(),
        "reml": {"lake_huron": lake_huron(),
                 "plain": reml(*design("plain"))},
    }
    with open(os.path.join(HERE, "covariance.json"), "w") as f:
        json.dump(out, f, separators=(",", ":"))
        f.write("\n")
