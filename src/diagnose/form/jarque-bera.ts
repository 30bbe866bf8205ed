import type { Regression } from "../../estimate/index.js";
import { chiSquared, counterRandom, type Matrix } from "../../numeric/index.js";
import { notComputed } from "../parts/laws.js";
import { basisColumns } from "../parts/projection.js";
import { centred, unitResiduals } from "../parts/residuals.js";
import type { Test } from "../test.js";

/** Skewness and kurtosis of residuals, and what they come to. */
export interface Shape {
  readonly skewness: number;
  /** 3 for the normal law. */
  readonly kurtosis: number;
  readonly test: Test;
}

/** T/6·(S² + (K−3)²/4) with moments divided by T. */
export function jarqueBeraStatistic(values: Float64Array): { S: number; K: number; JB: number } {
  const T = values.length;
  let m2 = 0;
  let m3 = 0;
  let m4 = 0;
  for (const e of values) {
    const square = e * e;
    m2 += square;
    m3 += square * e;
    m4 += square * square;
  }
  const S = (m3 / T) * (m2 / T) ** -1.5;
  const K = (m4 / T) * (m2 / T) ** -2;
  return { S, K, JB: (T / 6) * (S * S + (K - 3) ** 2 / 4) };
}

/**
 * Jarque and Bera (1980, 1987). The χ²(2) law is far off in samples of the usual size, so up to T = 1,000 the p-value is
 * simulated: normal errors through the same terms, `draws` times (p = (1 + those at least as large)/(1 + draws)). Beyond,
 * χ²(2). Dependent residuals move it.
 */
export function jarqueBera(m: Regression, seed: number, draws = 999): Shape {
  const name = "Jarque–Bera";
  const e = centred(unitResiduals(m, "form"));
  const { S, K, JB } = jarqueBeraStatistic(e);
  if (Number.isNaN(JB))
    return { skewness: S, kurtosis: K, test: notComputed(name, "the residuals do not vary") };
  if (m.T > 1000) {
    const p = chiSquared.upper(JB, 2);
    return {
      skewness: S,
      kurtosis: K,
      test: { name, statistic: JB, df: [2], distribution: "χ²(2)", p, valid: true },
    };
  }
  return {
    skewness: S,
    kurtosis: K,
    test: {
      name,
      statistic: JB,
      df: [],
      distribution: "simulated, normal errors",
      p: jarqueBeraUpper(JB, m.Q, seed, draws),
      valid: true,
      note: `${draws} draws, seed ${seed}`,
    },
  };
}

/**
 * (1 + draws at or above `statistic`) / (1 + draws) for residuals of normal errors regressed on the columns of an orthonormal
 * `Q` and centred. Deterministic given the seed.
 */
export function jarqueBeraUpper(statistic: number, Q: Matrix, seed: number, draws: number): number {
  const T = Q.rows;
  const basis = basisColumns(Q);
  const u = new Float64Array(T);
  let larger = 0;
  for (let draw = 0; draw < draws; draw++) {
    counterRandom(seed, draw).fillNormal(u);
    for (const q of basis) {
      let weight = 0;
      for (let t = 0; t < T; t++) weight += q[t]! * u[t]!;
      for (let t = 0; t < T; t++) u[t]! -= weight * q[t]!;
    }
    let mean = 0;
    for (const x of u) mean += x / T;
    for (let t = 0; t < T; t++) u[t]! -= mean;
    if (jarqueBeraStatistic(u).JB >= statistic) larger++;
  }
  return (1 + larger) / (1 + draws);
}
