import type { Regression } from "../../estimate/index.js";
import { autocorrelations } from "../dependence/correlogram.js";
import { notComputed } from "../parts/laws.js";
import { basisColumns } from "../parts/projection.js";
import type { Test } from "../test.js";
import { autoregression, drawErrors, innovationsOf, orderByAic } from "./error-process.js";
import type { SearchOptions } from "./sup-wald.js";
import { type BreakSearch, projectOut } from "./wald-path.js";

/**
 * The largest Wald statistic by a bootstrap that holds the terms fixed (Hansen 2000), so that trends and steps among them do
 * no harm. Errors are drawn from an autoregression (Bühlmann 1997; order by AIC) with innovations that keep the size each
 * residual had in its row (Wu 1986), so that neither dependence nor uneven variance does. Rows across a gap count as neighbours.
 *
 * The autocorrelations of residuals lean towards zero, the more so once the best break is taken out, and with them as they
 * stand the test rejects too often; with a break left in they lean towards one, and it rejects too rarely. So both sets are first
 * moved until drawn errors, treated alike, show on average what was found, and their mean is used. Measured at 5 %, two
 * coefficients, 300 draws (MC error 1.3 points): size 8, 11, 14 % at ρ = 0.5, 0.7, 0.9 and T = 100, where the plain law has 42, 69, 96 %;
 * power 88 % for a shift by one standard deviation in independent errors.
 */
export function bootstrap(
  m: Regression,
  full: BreakSearch,
  best: number,
  options: SearchOptions,
): { robust: Test; order: number } {
  const name = "sup-Wald, robust";
  const { T, k, periods } = m;
  const draws = options.draws ?? (T <= 2000 ? 499 : 199);
  const seed = options.seed ?? 1;
  if (draws === 0) return { robust: notComputed(name, "no draws asked for"), order: 0 };
  const search = full.thinned(300, best);
  const basis = basisColumns(m.Q);
  const largest = (e: Float64Array) => {
    const total = e.reduce((sum, x) => sum + x * x, 0);
    const reductions = search.reductions(e);
    let at = 0;
    for (let i = 1; i < reductions.length; i++) if (reductions[i]! > reductions[at]!) at = i;
    return { at, wald: (reductions[at]! / (total - reductions[at]!)) * (T - k - search.q) };
  };
  const found = largest(m.residuals);
  const errors = search.withBreak(m.residuals, found.at);
  const highest = Math.max(0, Math.min(12, Math.floor(T / 12)));
  const order = Math.max(orderByAic(errors, periods, highest), orderByAic(m.residuals, periods, highest));
  const u = new Float64Array(T);
  const trials = order === 0 ? 0 : 20;
  const matched = (residuals: Float64Array, leave: (u: Float64Array) => Float64Array) => {
    const wanted = autocorrelations(residuals, periods, order).r;
    const r = wanted.slice();
    for (let round = 0; round < 2 && trials > 0; round++) {
      const phi = autoregression(r);
      const shown = new Float64Array(order);
      for (let trial = 0; trial < trials; trial++) {
        drawErrors(phi, seed, 1_000_000 + trial, u);
        projectOut(u, basis);
        autocorrelations(leave(u), periods, order).r.forEach((value, i) => {
          shown[i]! += value / trials;
        });
      }
      for (let i = 0; i < order; i++) r[i]! += wanted[i]! - shown[i]!;
    }
    return r;
  };
  const without = matched(m.residuals, (v) => v);
  const withOne = matched(errors, (v) => search.withBreak(v, largest(v).at));
  const r = without.map((value, i) => (value + withOne[i]!) / 2);
  const phi = autoregression(r);
  const scale = innovationsOf(errors, phi);
  let larger = 0;
  for (let draw = 0; draw < draws; draw++) {
    drawErrors(phi, seed, draw, u, scale);
    projectOut(u, basis);
    if (largest(u).wald >= found.wald) larger++;
  }
  const robust: Test = {
    name,
    statistic: found.wald,
    df: [search.q],
    distribution: "bootstrap, terms fixed",
    p: (1 + larger) / (1 + draws),
    valid: true,
    note: `${draws} draws, seed ${seed}, ${order === 0 ? "independent errors" : `AR(${order}) errors`} of the residuals' uneven size`,
  };
  return { robust, order };
}
