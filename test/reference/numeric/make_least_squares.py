"""Writes least_squares.json: least-squares solutions of inputs taken as exact doubles, by rational arithmetic (fractions), each
number rounded once. The designs are made up here, except NIST StRD Wampler 1-5 (Wampler 1970), which follow from their
definitions: y a polynomial of degree five in x = 0..20, plus the alternating offsets of the set for 3 to 5.
Run in this folder: python make_least_squares.py"""

import json
import math
from fractions import Fraction


def solve(columns, y):
    """Coefficients, rss and the diagonal of (X'X)^-1, exactly."""
    X = [[Fraction(v) for v in column] for column in columns]
    Y = [Fraction(v) for v in y]
    k = len(X)
    inner = lambda a, b: sum(p * q for p, q in zip(a, b))
    rows = [[inner(X[i], X[j]) for j in range(k)] + [inner(X[i], Y)] + [Fraction(i == j) for j in range(k)] for i in range(k)]
    for p in range(k):
        pivot = rows[p][p]
        assert pivot != 0
        rows[p] = [v / pivot for v in rows[p]]
        for i in range(k):
            if i != p and rows[i][p] != 0:
                factor = rows[i][p]
                rows[i] = [a - factor * b for a, b in zip(rows[i], rows[p])]
    beta = [row[k] for row in rows]
    fitted = [sum(b * column[t] for b, column in zip(beta, X)) for t in range(len(Y))]
    rss = sum((a - b) ** 2 for a, b in zip(Y, fitted))
    return beta, rss, [rows[j][k + 1 + j] for j in range(k)]


cases = {}


def add(name, columns, y):
    columns = [[float(v) for v in column] for column in columns]
    y = [float(v) for v in y]
    beta, rss, gram = solve(columns, y)
    cases[name] = {
        "columns": columns,
        "y": y,
        "coefficients": [float(b) for b in beta],
        "rss": float(rss),
        "gramDiagonal": [float(g) for g in gram],
    }


x = list(range(21))
powers = [[v**p for v in x] for p in range(6)]
offsets = [759, -2048, 2048, -2048, 2523, -2048, 2048, -2048, 1838, -2048, 2048, -2048, 1838, -2048, 2048, -2048, 2523,
           -2048, 2048, -2048, 759]  # from memory; orthogonal to all six powers, as is asserted here
assert all(sum(o * v for o, v in zip(offsets, column)) == 0 for column in powers)
ones = [sum(v**p for p in range(6)) for v in x]
add("wampler1", powers, ones)
add("wampler2", powers, [sum(Fraction(v, 10) ** p for p in range(6)) for v in x])
for name, factor in (("wampler3", 1), ("wampler4", 100), ("wampler5", 10_000)):
    add(name, powers, [a + factor * b for a, b in zip(ones, offsets)])

noise = [math.sin(37.7 * t * t) for t in range(120)]
T = 60
clock = [1.7e12 + 86_400_000 * t for t in range(T)]
add("clock in milliseconds", [[1] * T, clock, noise[:T]], [3 + 0.01 * t + noise[t + 1] for t in range(T)])
points = [-8.8 + 5.7 * t / 81 for t in range(82)]
add("ten powers, condition 1e15", [[p**j for p in points] for j in range(11)], [0.8 + 0.1 * p + 0.003 * noise[t] for t, p in enumerate(points)])
add("two nearly equal columns", [[1] * T, noise[:T], [v + 1e-11 * noise[t + 7] for t, v in enumerate(noise[:T])]], noise[9 : 9 + T])
add("levels that drift", [[1] * T, [1e6 + t + noise[t] for t in range(T)], [1e6 + 1.0001 * t for t in range(T)], [t * t for t in range(T)]],
    [5e5 + 0.3 * t + noise[t + 5] for t in range(T)])
add("sizes far apart", [[1e-9 * noise[t] for t in range(T)], [1e11 * noise[t + 20] for t in range(T)], [1] * T], noise[40 : 40 + T])
with open("least_squares.json", "w") as file:
    json.dump(cases, file)
    file.write("\n")
