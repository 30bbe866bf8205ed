"""Writes distributions.json: tails and quantiles at 50 digits by mpmath, rounded to doubles.

Tails by the continued fractions of the incomplete beta and gamma functions (Abramowitz and Stegun 1964, 26.5.8 and 6.5.31),
checked here against mpmath's own betainc and gammainc, which give up at large parameters.
Run in this folder with mpmath installed: python make_distributions.py"""

import json

from mpmath import betainc, erfc, exp, findroot, gammainc, log, loggamma, mp, mpf, sqrt

mp.dps = 50


def beta_fraction(x, a, b):
    front = exp(a * log(x) + b * log(1 - x) + loggamma(a + b) - loggamma(a + 1) - loggamma(b))
    c = mpf(1)
    d = 1 / (1 - (a + b) * x / (a + 1))
    h = d
    m = 0
    while True:
        m += 1
        even = m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m))
        d = 1 / (1 + even * d)
        c = 1 + even / c
        h *= c * d
        odd = -(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1))
        d = 1 / (1 + odd * d)
        c = 1 + odd / c
        h *= c * d
        if abs(c * d - 1) < mpf(10) ** -45:
            return front * h


def beta_shares(x, y, a, b):
    """I_x(a, b) and what it lacks to one; y = 1 - x."""
    if x < (a + 1) / (a + b + 2):
        lower = beta_fraction(x, a, b)
        return lower, 1 - lower
    upper = beta_fraction(y, b, a)
    return 1 - upper, upper


def gamma_shares(s, x):
    if x < s + 1:
        term = total = mpf(1)
        n = 0
        while term > total * mpf(10) ** -48:
            n += 1
            term *= x / (s + n)
            total += term
        lower = exp(s * log(x) - x - loggamma(s + 1)) * total
        return lower, 1 - lower
    b = x + 1 - s
    c = mpf(10) ** 200
    d = 1 / b
    h = d
    i = 0
    while True:
        i += 1
        b += 2
        d = 1 / (b - i * (i - s) * d)
        c = b - i * (i - s) / c
        h *= c * d
        if abs(c * d - 1) < mpf(10) ** -45:
            upper = exp(s * log(x) - x - loggamma(s)) * h
            return 1 - upper, upper


def student(x, df):
    x, df = mpf(x), mpf(df)
    square = x * x
    upper = beta_shares(df / (df + square), square / (df + square), df / 2, mpf(1) / 2)[0] / 2
    return (1 - upper, upper) if x > 0 else (upper, 1 - upper)


def fisher(x, a, b):
    x, a, b = mpf(x), mpf(a), mpf(b)
    return beta_shares(a * x / (b + a * x), b / (b + a * x), a / 2, b / 2)


def chi(x, df):
    return gamma_shares(mpf(df) / 2, mpf(x) / 2)


def normal(x):
    return erfc(-mpf(x) / sqrt(2)) / 2, erfc(mpf(x) / sqrt(2)) / 2


def near(a, b):
    assert abs(a / b - 1) < mpf(10) ** -40, (a, b)


near(student(2.1, 7)[1], betainc(mpf(7) / 2, mpf(1) / 2, 0, 7 / (7 + mpf(2.1) ** 2), regularized=True) / 2)
near(fisher(1.9, 8, 180)[1], betainc(90, 4, 0, 180 / (180 + 8 * mpf(1.9)), regularized=True))
near(chi(40.0, 12)[1], gammainc(6, 20, regularized=True))
near(chi(9.0, 12)[1], gammainc(6, mpf(4.5), regularized=True))

cases = {"normal": [], "studentT": [], "fisher": [], "chiSquared": [], "normalQuantile": []}


def add(name, x, df, shares):
    cases[name].append({"x": x, "df": df, "lower": float(shares[0]), "upper": float(shares[1])})


for x in (-38.0, -8.5, -3.2, -0.4, 0.0, 1e-9, 0.7, 1.499, 1.5, 1.96, 4.5, 9.0, 20.0, 37.0):
    add("normal", x, [], normal(x))
for df in (0.5, 1, 2.5, 7, 30, 187, 5000, 1e6):
    for x in (-3.0, 1e-8, 0.01, 0.9, 1.96, 5.5, 14.0, 60.0):
        add("studentT", x, [df], student(x, df))
for df in ((1, 20), (1, 1e5), (3, 7.5), (8, 180), (10, 47), (40, 3000), (200, 1e5)):
    for x in (1e-10, 0.05, 0.8, 1.1, 1.9, 5.0, 25.0):
        add("fisher", x, list(df), fisher(x, *df))
for df in (0.2, 1, 2, 4.5, 12, 100, 3000, 1e5):
    for share in (1e-12, 0.02, 0.4, 0.95, 1.0, 1.3, 4.0, 30.0):
        add("chiSquared", float(df * share), [df], chi(float(df * share), df))
for p in (1e-300, 1e-40, 1e-12, 0.0005, 0.025, 0.2, 0.43, 0.5, 0.77, 0.975, 0.999999):
    tail = mpf(p) if p <= 0.5 else 1 - mpf(p)
    guess = sqrt(-2 * log(tail))
    root = mpf(0) if p == 0.5 else findroot(lambda x: log(erfc(x / sqrt(2)) / 2) - log(tail), guess)
    root = -root if p < 0.5 else root
    cases["normalQuantile"].append({"p": p, "x": float(root)})
with open("distributions.json", "w") as file:
    json.dump(cases, file, indent=1)
    file.write("\n")
