"""Writes distributions.json: tails and quantiles at 40 digits by mpmath, rounded to doubles.
Run in this folder with mpmath installed: python make_distributions.py"""

import json
import random

from mpmath import betainc, erfc, findroot, gammainc, log, mp, mpf, sqrt

mp.dps = 40
random.seed(7)


def t_upper(x, df):
    x = mpf(x)
    return betainc(mpf(df) / 2, mpf(1) / 2, 0, df / (df + x * x), regularized=True) / 2


def f_upper(x, a, b):
    x = mpf(x)
    return betainc(mpf(b) / 2, mpf(a) / 2, 0, b / (b + a * x), regularized=True)


def chi_upper(x, df):
    return gammainc(mpf(df) / 2, mpf(x) / 2, regularized=True)


def normal_upper(x):
    return erfc(mpf(x) / sqrt(2)) / 2


cases = {"normal": [], "studentT": [], "fisher": [], "chiSquared": [], "normalQuantile": []}
for x in (-8.5, -3.2, -0.4, 0.0, 0.7, 1.96, 4.5, 9.0, 20.0, 37.0):
    cases["normal"].append({"x": x, "df": [], "upper": float(normal_upper(x))})
for df in (1, 2.5, 7, 30, 187, 5000):
    for x in (0.01, 0.9, 2.1, 5.5, 14.0, 60.0):
        cases["studentT"].append({"x": x, "df": [df], "upper": float(t_upper(x, df))})
for df in ((1, 20), (3, 7.5), (8, 180), (40, 3000)):
    for x in (0.05, 0.8, 1.9, 5.0, 25.0):
        cases["fisher"].append({"x": x, "df": list(df), "upper": float(f_upper(x, *df))})
for df in (1, 2, 4.5, 12, 100):
    for x in (0.02, 1.5, 9.0, 40.0, 250.0):
        cases["chiSquared"].append({"x": x, "df": [df], "upper": float(chi_upper(x, df))})
for p in (1e-300, 1e-40, 1e-12, 0.0005, 0.025, 0.2, 0.43, 0.5, 0.77, 0.975, 0.999999):
    tail = mpf(p) if p <= 0.5 else 1 - mpf(p)
    guess = sqrt(-2 * log(tail))
    root = mpf(0) if p == 0.5 else findroot(lambda x: log(erfc(x / sqrt(2)) / 2) - log(tail), guess)
    root = -root if p < 0.5 else root
    cases["normalQuantile"].append({"p": p, "x": float(root)})
with open("distributions.json", "w") as file:
    json.dump(cases, file, indent=1)
    file.write("\n")
