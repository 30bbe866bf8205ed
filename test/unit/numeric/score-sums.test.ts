import { test } from "node:test";
import fc from "fast-check";
import {
  counterRandom,
  type Matrix,
  matrix,
  scoreGram,
  scoreLaggedProducts,
  scoreMovingSums,
} from "../../../src/numeric/index.js";
import { agree } from "../../support/digits.js";

/** The definition, term by term: Σ_s Σ_t w(|s − t|) v_s v_t' with distances in time. */
function byDefinition(
  X: Matrix,
  u: Float64Array,
  periods: Float64Array,
  weight: (lag: number) => number,
): Float64Array {
  const { rows: T, columns: k } = X;
  const result = new Float64Array(k * k);
  for (let a = 0; a < k; a++)
    for (let b = 0; b < k; b++)
      for (let s = 0; s < T; s++)
        for (let t = 0; t < T; t++)
          result[b * k + a]! +=
            weight(Math.abs(periods[s]! - periods[t]!)) *
            X.data[a * T + s]! *
            u[s]! *
            X.data[b * T + t]! *
            u[t]!;
  return result;
}

function example(T: number, gap: boolean, seed: number) {
  const X = matrix(T, 3, counterRandom(seed, 1).fillNormal(new Float64Array(3 * T)));
  X.data.fill(1, 0, T);
  const u = counterRandom(seed, 2).fillNormal(new Float64Array(T));
  const periods = Float64Array.from(
    { length: T },
    (_, t) => 1000 + t + (gap && t > T / 3 ? 4 : 0) + (gap && t > T / 2 ? 1 : 0),
  );
  return { X, u, periods };
}

test("moving sums equal the lag sum, whatever the number of lags, with gaps and without", () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 4, max: 50 }),
      fc.integer({ min: 0, max: 70 }),
      fc.boolean(),
      fc.nat(1e6),
      (T, lags, gap, seed) => {
        const { X, u, periods } = example(T, gap, seed);
        const wanted = byDefinition(X, u, periods, (lag) => Math.max(0, 1 - lag / (lags + 1)));
        const scale = Math.max(...wanted.map(Math.abs));
        agree(
          scoreMovingSums(X, u, periods, lags).data.map((v) => 1 + v / scale),
          wanted.map((v) => 1 + v / scale),
          12,
        );
      },
    ),
    { numRuns: 80, seed: 3 },
  );
});

test("no lags give the plain Gram matrix of the scores", () => {
  const { X, u, periods } = example(200, false, 8);
  agree(scoreMovingSums(X, u, periods, 0).data, scoreGram(X, u).data, 12);
});

test("weighted lagged products equal the definition, directly and by Fourier transform", () => {
  for (const [T, lags] of [
    [40, 39],
    [40, 5],
    [900, 850],
  ] as const) {
    const { X, u, periods } = example(T, true, 9);
    const weights = Float64Array.from({ length: lags + 1 }, (_, j) => Math.cos(j / lags) / (1 + j));
    const wanted = byDefinition(X, u, periods, (lag) => weights[lag] ?? 0);
    const scale = Math.max(...wanted.map(Math.abs));
    agree(
      scoreLaggedProducts(X, u, periods, weights).data.map((v) => 1 + v / scale),
      wanted.map((v) => 1 + v / scale),
      11,
    );
  }
});
