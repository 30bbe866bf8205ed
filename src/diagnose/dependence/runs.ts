import { logGamma } from "../../numeric/index.js";
import { normalTest, notComputed } from "../parts/laws.js";
import type { Test } from "../test.js";

const name = "Runs";

/**
 * Runs of one sign in `values` (Wald and Wolfowitz 1940), zeros left out, against what exchangeable signs give: the
 * exact law up to 60 signs, the normal one beyond. Two-sided, twice the smaller tail. The law of signs does not
 * depend on the variances; residuals are exchangeable only approximately. `statistic` is the number of runs in the
 * exact test, a z ratio in the other.
 */
export function runs(values: Float64Array): Test {
  const signs = values.filter((x) => x !== 0).map(Math.sign);
  const n = signs.length;
  const above = signs.filter((x) => x > 0).length;
  const below = n - above;
  if (above === 0 || below === 0) return notComputed(name, "all residuals have one sign");
  let count = 1;
  for (let t = 1; t < n; t++) if (signs[t] !== signs[t - 1]) count++;
  const mean = 1 + (2 * above * below) / n;
  const found = `${count} runs, ${mean.toFixed(1)} expected`;
  if (n > 60) {
    const variance = (2 * above * below * (2 * above * below - n)) / (n * n * (n - 1));
    return normalTest(name, (count - mean) / Math.sqrt(variance), { note: found });
  }
  let lower = 0;
  let upper = 0;
  for (let runs = 2; runs <= n; runs++) {
    const probability = runsProbability(runs, above, below);
    if (runs <= count) lower += probability;
    if (runs >= count) upper += probability;
  }
  const p = Math.min(1, 2 * Math.min(lower, upper));
  return { name, statistic: count, df: [], distribution: "exact", p, valid: true, note: found };
}

/** P(number of runs = `runs`) for `a` signs of one kind and `b` of the other in random order. */
export function runsProbability(runs: number, a: number, b: number): number {
  const m = Math.floor(runs / 2);
  const all = logChoose(a + b, a);
  const ways = (i: number, j: number) => Math.exp(logChoose(a - 1, i) + logChoose(b - 1, j) - all);
  return runs % 2 === 0 ? 2 * ways(m - 1, m - 1) : ways(m, m - 1) + ways(m - 1, m);
}

function logChoose(n: number, k: number): number {
  if (k < 0 || k > n) return Number.NEGATIVE_INFINITY;
  return logGamma(n + 1) - logGamma(k + 1) - logGamma(n - k + 1);
}
