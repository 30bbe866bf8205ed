"""Recomputes the expected figures of cases.json from <case>.design.csv: least squares in 60-digit arithmetic on the
file's doubles, each figure rounded once. Prints the least digits in which a list of cases.json agrees; with --write it
puts its own figures there. Run: .venv/bin/python test/reference/estimate/make_cases.py"""
import csv
import json
import math
import pathlib
import sys

import numpy
from mpmath import mp, mpf

mp.dps = 60
here = pathlib.Path(__file__).parent


def figures(path):
    with open(path) as file:
        rows = list(csv.DictReader(file))
    k = sum(name.startswith("x") and name[1:].isdigit() for name in rows[0])
    y = mp.matrix([mpf(float(row["y"])) for row in rows])
    X = mp.matrix([[mpf(float(row[f"x{j + 1}"])) for j in range(k)] for row in rows])
    T = len(rows)
    inverse = (X.T * X) ** -1
    beta = inverse * (X.T * y)
    residuals = y - X * beta
    rss = mp.fdot(residuals, residuals)
    df = T - k
    s2 = rss / df
    mean = mp.fsum(y) / T
    tss = mp.fsum((v - mean) ** 2 for v in y)
    se = [mp.sqrt(s2 * inverse[j, j]) for j in range(k)]
    t = [beta[j] / se[j] for j in range(k)]
    two_sided = lambda x: mp.betainc(mpf(df) / 2, mpf(1) / 2, 0, df / (df + x * x), regularized=True)
    loglik = -mpf(T) / 2 * (mp.log(2 * mp.pi) + mp.log(rss / T) + 1)
    critical = mp.findroot(lambda c: two_sided(c) - mpf("0.05"), 2)
    unit = numpy.array(X.tolist(), dtype=float)
    unit /= numpy.linalg.norm(unit, axis=0)
    leverage = [(X[i, :] * inverse * X[i, :].T)[0] for i in range(T)]
    return {
        "coefficients": list(beta),
        "se_classical": se,
        "t": t,
        "p_two_sided": [two_sided(x) for x in t],
        "rss": rss,
        "tss_centred": tss,
        "residual_variance": s2,
        "residual_sd": mp.sqrt(s2),
        "r_squared": 1 - rss / tss if k > 1 else mpf(0),  # exactly, with nothing but a constant
        "loglik": loglik,
        "aic": -2 * loglik + 2 * (k + 1),
        "bic": -2 * loglik + (k + 1) * mp.log(T),
        "t_critical_975": critical,
        "condition_number_scaled": numpy.linalg.cond(unit),
        "residuals_first5": list(residuals[:5]),
        "residuals_last5": list(residuals[T - 5 :]),
        "max_leverage": max(leverage),
    }


def rounded(value):
    return [float(v) for v in value] if isinstance(value, list) else float(value)


def digits(found, wanted):
    if isinstance(wanted, list):
        return min(map(digits, found, wanted))
    return 16 if found == wanted else min(16, -math.log10(abs(found - wanted) / max(abs(wanted), 1e-300)))


cases = json.loads((here / "cases.json").read_text())
for name, case in cases.items():
    made = {key: rounded(value) for key, value in figures(here / "cases" / f"{name}.design.csv").items()}
    for key, value in made.items():
        print(f"{name:28} {key:24} {digits(value, case['ols'].get(key)):.1f}")
    case["ols"].update(made)
if "--write" in sys.argv:
    (here / "cases.json").write_text(json.dumps(cases, indent=1) + "\n")
