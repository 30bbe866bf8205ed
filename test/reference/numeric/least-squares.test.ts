// Least squares of exact doubles against rational arithmetic (make_least_squares.py): NIST's Wampler sets and designs with
// scaled condition numbers up to 4e11.
import assert from "node:assert/strict";
import { test } from "node:test";
import { fromColumns, solveLeastSquares } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree } from "../../support/digits.js";

interface Case {
  columns: number[][];
  y: number[];
  coefficients: number[];
  rss: number;
  gramDiagonal: number[];
}

for (const [name, c] of Object.entries(
  fixture<Record<string, Case>>("reference/numeric/least_squares.json"),
)) {
  test(`${name}: coefficients to the last bit, the rest to the digits stated`, () => {
    const X = fromColumns(c.columns);
    const found = solveLeastSquares(X, Float64Array.from(c.y));
    assert.deepEqual([...found.coefficients], c.coefficients);
    // Where the fit is perfect but for the rounding of y, the residuals are that rounding.
    if (c.rss > 0) agree([found.rss], [c.rss], 15 - (c.rss < 1e-12 ? 1 : 0), "rss");
    const k = c.columns.length;
    const diagonal = c.columns.map((_, j) => found.gramInverse.data[j * k + j]!);
    agree(diagonal, c.gramDiagonal, Math.min(15, 32 - 2 * Math.log10(found.condition)), "(X'X)⁻¹");
  });
}
