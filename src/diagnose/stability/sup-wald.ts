import type { Regression } from "../../estimate/index.js";
import { autocorrelations } from "../dependence/correlogram.js";
import { logOddsRange, supWaldUpper } from "../laws/sup-f.js";
import { notComputed } from "../parts/laws.js";
import { basisColumns, residualised } from "../parts/projection.js";
import type { Test } from "../test.js";
import { breakingTerms } from "./breaking-terms.js";
import { dependenceReach, dependentMultipliers } from "./multipliers.js";
import { type BreakSearch, breakSearch } from "./wald-path.js";

/** How a break is searched for. */
export interface SearchOptions {
  /** Share of the sample kept free at either end; default 0.15. */
  readonly trim?: number;
  /** Positions of the terms that may break; default all that vary on both sides. */
  readonly candidates?: readonly number[];
  readonly seed?: number;
  /** Draws of the bootstrap; 0 leaves it out. Default 499 up to 2,000 periods, 199 beyond. */
  readonly draws?: number;
}

/** What the search for one break finds. */
export interface SupWald {
  /** Largest Wald statistic W = q·F by the law of Andrews (1993), for even, independent errors and stationary terms. */
  readonly plain: Test;
  /** The same largest F by a bootstrap that keeps the terms as they are and the errors' dependence and unevenness. */
  readonly robust: Test;
  /** Rows before the break where W is largest; −1 where nothing could be searched. */
  readonly rowsBefore: number;
  readonly path: readonly { readonly rowsBefore: number; readonly wald: number }[];
  readonly breaking: readonly number[];
  readonly held: readonly number[];
  /** Rows over which the bootstrap's multipliers are correlated. */
  readonly reach: number;
}

/** Searches all dates between the trimmed ends for one break in the coefficients. */
export function supWald(m: Regression, options: SearchOptions = {}): SupWald {
  const { T, k } = m;
  const trim = options.trim ?? 0.15;
  const side = Math.max(k + 1, Math.ceil(trim * T));
  const { breaking, held } = breakingTerms(m, side, side, options.candidates);
  const q = breaking.length;
  const nothing = (note: string): SupWald => ({
    plain: notComputed("sup-Wald", note),
    robust: notComputed("sup-Wald, robust", note),
    rowsBefore: -1,
    path: [],
    breaking,
    held,
    reach: 1,
  });
  if (T - 2 * side < 1 || T - k - q < 1)
    return nothing(`${T} periods leave no date with ${side} periods on both sides`);
  if (q === 0) return nothing("no term varies on both sides of every date");
  const dates = Array.from({ length: T - 2 * side + 1 }, (_, i) => side + i);
  const search = breakSearch(m, breaking, dates);
  if (search.dates.length === 0) return nothing("the terms do not determine a break at any date");
  const e = m.residuals;
  const total = e.reduce((sum, x) => sum + x * x, 0);
  const reductions = search.reductions(e);
  const wald = reductions.map((drop) => (drop / (total - drop)) * (T - k - q));
  const best = wald.reduce((at, w, i) => (w > wald[at]! ? i : at), 0);
  const low = search.dates[0]! / T;
  const high = search.dates[search.dates.length - 1]! / T;
  const steps = search.dates[search.dates.length - 1]! - search.dates[0]!;
  const p = steps > 0 ? supWaldUpper(wald[best]!, q, logOddsRange(low, high), steps) : Number.NaN;
  const plain: Test = {
    name: "sup-Wald",
    statistic: wald[best]!,
    df: [q],
    distribution: `largest of ${search.dates.length} dates, ${q} coefficients`,
    p,
    valid: true,
  };
  const { robust, reach } = bootstrap(m, search, best, options);
  const every = Math.max(1, Math.ceil(wald.length / 400));
  const path = [...wald.keys()]
    .filter((i) => i % every === 0 || i === best || i === wald.length - 1)
    .map((i) => ({ rowsBefore: search.dates[i]!, wald: wald[i]! }));
  return { plain, robust, rowsBefore: search.dates[best]!, path, breaking, held, reach };
}

/**
 * Hansen's (2000) bootstrap with the terms held fixed: errors of each draw are the residuals of the best break times normal
 * multipliers, which Shao (2010) correlates over as many rows as the residuals' own autocorrelation asks for.
 */
function bootstrap(m: Regression, full: BreakSearch, best: number, options: SearchOptions) {
  const name = "sup-Wald, robust";
  const { T, k } = m;
  const draws = options.draws ?? (T <= 2000 ? 499 : 199);
  if (draws === 0) return { robust: notComputed(name, "no draws asked for"), reach: 1 };
  const dates = [...full.dates];
  const every = Math.max(1, Math.ceil(dates.length / 300));
  const grid = dates.filter((_, i) => i % every === 0 || i === best);
  const search =
    every === 1
      ? full
      : breakSearch(m, breakingTerms(m, dates[0]!, T - dates.at(-1)!, options.candidates).breaking, grid);
  const largest = (e: Float64Array) => {
    const total = e.reduce((sum, x) => sum + x * x, 0);
    return search
      .reductions(e)
      .reduce((most, drop) => Math.max(most, (drop / (total - drop)) * (T - k - search.q)), 0);
  };
  const found = largest(m.residuals);
  const errors = withoutBreak(m, dates[best]!);
  const { r } = autocorrelations(errors, m.periods, 1);
  const reach = dependenceReach(r[0]!, T);
  const basis = basisColumns(m.Q);
  const u = new Float64Array(T);
  let larger = 0;
  for (let draw = 0; draw < draws; draw++) {
    dependentMultipliers(options.seed ?? 1, draw, reach, u);
    for (let t = 0; t < T; t++) u[t]! *= errors[t]!;
    projectOnce(u, basis);
    if (largest(u) >= found) larger++;
  }
  const robust: Test = {
    name,
    statistic: found,
    df: [search.q],
    distribution: "wild bootstrap, terms fixed",
    p: (1 + larger) / (1 + draws),
    valid: true,
    note: `${draws} draws, seed ${options.seed ?? 1}, multipliers correlated over ${reach} ${reach === 1 ? "row" : "rows"}`,
  };
  return { robust, reach };
}

function projectOnce(u: Float64Array, basis: readonly Float64Array[]): void {
  for (const q of basis) {
    let weight = 0;
    for (let t = 0; t < u.length; t++) weight += q[t]! * u[t]!;
    for (let t = 0; t < u.length; t++) u[t]! -= weight * q[t]!;
  }
}

/** Residuals of the terms fitted separately before and after the break. */
function withoutBreak(m: Regression, rowsBefore: number): Float64Array {
  const basis: Float64Array[] = [];
  const columns = basisColumns(m.Q);
  for (const after of [false, true])
    for (const q of columns) {
      const part = q.map((x, t) => (t >= rowsBefore === after ? x : 0));
      const rest = residualised(part, basis);
      const length = Math.sqrt(rest.reduce((sum, x) => sum + x * x, 0));
      if (length > 1e-8) basis.push(rest.map((x) => x / length));
    }
  return residualised(m.residuals, basis);
}
