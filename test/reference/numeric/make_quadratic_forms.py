"""Writes quadratic_forms.json: laws of weighted sums of chi-squared variables at 40 digits by mpmath, rounded to doubles.

`sums`: both tails of sum(l_i chi2_1) at x, by the moment generating function along a hyperbola through the saddle point, the
trapezoid rule at a step where it has 30 digits; checked here against closed forms. `craig`: P(|Z| > c sqrt(Q)) by
Craig's integral in a variable in which the trapezoid rule has 30 digits, checked against Student's t and against mpmath's
adaptive quadrature of the integral as it stands.
Run in this folder with mpmath installed: python make_quadratic_forms.py"""

import json

from mpmath import (betainc, cosh, erfc, exp, gammainc, im, log, log1p, mp, mpf, pi, quad, sin, sinh, sqrt)

mp.dps = 40


def tails(weights, x):
    weights = [mpf(w) for w in weights]
    x = mpf(x)
    side = 1 if x >= sum(weights) else -1
    here = [abs(w) for w in weights if w * side > 0]
    low = mpf(10) ** -30
    high = 1 / (2 * max(here)) * (1 - mpf(10) ** -30) if here else mpf(10) ** 30

    def slope(u):
        t = side * u
        return side * (sum(w / (1 - 2 * w * t) for w in weights) - x - 1 / t)

    for _ in range(300):
        middle = sqrt(low * high) if high / low > 2 else (low + high) / 2
        if slope(middle) < 0:
            low = middle
        else:
            high = middle
    c = side * low
    scale = 1 / sqrt(sum(2 * w * w / (1 - 2 * w * c) ** 2 for w in weights) + 1 / c**2)
    tilt = mpf((x > 0) - (x < 0)) / 2
    upright = sqrt(1 - tilt * tilt)

    def f(v):
        z = c + scale * tilt * (cosh(v) - 1) + 1j * scale * upright * sinh(v)
        dz = scale * tilt * sinh(v) + 1j * scale * upright * cosh(v)
        return im(exp(-sum(log(1 - 2 * w * z) for w in weights) / 2 - z * x) / z * dz)

    h = mpf(1) / 32
    total = f(mpf(0)) / 2
    first = abs(total)
    v = h
    while v < 200:
        term = f(v)
        total += term
        if v > 6 and abs(term) < first * mpf(10) ** -33:
            break
        v += h
    p = total * h / pi
    return (1 - p, p) if side > 0 else (-p, 1 + p)


def craig(c, weights):
    """With sin v = 1 / cosh u, by the trapezoid rule."""
    a = [mpf(c) ** 2 * mpf(w) for w in weights]
    h = mpf(1) / 16 / sqrt(1 + sum(w / (1 + w) for w in a))
    total = mpf(1) / 2 * exp(-sum(log1p(w) for w in a) / 2)
    u = h
    while True:
        term = exp(-sum(log1p(w * cosh(u) ** 2) for w in a) / 2) / cosh(u)
        total += term
        u += h
        if term < total * mpf(10) ** -33:
            return total * h * 2 / pi


def craig_as_it_stands(c, weights):
    a = [mpf(c) ** 2 * mpf(w) for w in weights]
    top = pi / 2
    points = [0] + [top / 2**i for i in range(12, -1, -1)]
    return quad(lambda v: exp(-sum(log1p(w / sin(v) ** 2) for w in a) / 2), points) * 2 / pi


def student(c, df):
    return betainc(mpf(df) / 2, mpf(1) / 2, 0, df / (df + mpf(c) ** 2), regularized=True)


def near(a, b):
    assert abs(a / b - 1) < mpf(10) ** -25, (a, b)


near(tails([1, 1], 3)[1], exp(mpf(-3) / 2))
near(tails([1], 4)[1], erfc(sqrt(2)))
near(tails([1, 1, -2, -2], 0)[1], mpf(1) / 3)
near(tails([1, 1, 1], 0.01)[0], gammainc(mpf(3) / 2, 0, mpf(0.01) / 2, regularized=True))
near(tails([-2], -90)[0], erfc(sqrt(mpf(90) / 4)))
near(craig(2.5, [mpf(1) / 5] * 5), student(2.5, 5))
near(craig(0.01, [mpf(1) / 5] * 5), student(0.01, 5))
near(craig(20, [mpf(1) / 41] * 41), student(20, 41))
near(craig(1.7, [1, 0.3, 0.01]), craig_as_it_stands(1.7, [1, 0.3, 0.01]))

bridge = [1 / (i * i * 9.87) for i in range(1, 21)]
mixed = [3.0, 1.0, 0.25, -0.5, -2.0]
many = [2 - 1.99 * (i / 40) for i in range(41)]
sums = []
for weights, points in (
    ([1.0], [1e-6, 0.3, 4.0, 60.0]),
    ([1.0, 1.0, 1.0, 1.0], [0.001, 2.0, 9.5, 400.0]),
    ([5.0, 1e-6], [1e-4, 3.0, 40.0]),
    ([-1.0, -0.2], [-30.0, -0.5, -1e-3]),
    (mixed, [-60.0, -4.0, -0.1, 0.0, 0.7, 3.0, 20.0, 300.0]),
    (bridge, [0.015, 0.05, 0.463, 0.739, 3.0]),
    (many, [12.0, 35.0, 41.0, 70.0, 160.0]),
    ([v - 1.2 for v in many], [0.0]),
    ([v - 0.4 for v in many], [0.0]),
):
    for x in points:
        lower, upper = tails(weights, x)
        sums.append({"weights": weights, "x": x, "lower": float(lower), "upper": float(upper)})
equal = lambda n: [1 / n] * n
laws = [
    {"c": c, "weights": weights, "p": float(craig(c, weights))}
    for weights in (equal(1), equal(7), equal(120), bridge, [1.0, 1e-3, 1e-9])
    for c in (1e-4, 0.02, 0.8, 2.3, 9.0, 70.0)
]
with open("quadratic_forms.json", "w") as file:
    json.dump({"sums": sums, "craig": laws}, file)
    file.write("\n")
