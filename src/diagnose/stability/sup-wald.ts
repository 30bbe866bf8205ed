import type { Regression } from "../../estimate/index.js";
import { logOddsRange, supWaldUpper } from "../laws/sup-f.js";
import { notComputed } from "../parts/laws.js";
import type { Test } from "../test.js";
import { bootstrap } from "./bootstrap.js";
import { breakingTerms } from "./breaking-terms.js";
import { breakSearch } from "./wald-path.js";

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
  /** Order of the autoregression that the bootstrap draws errors from. */
  readonly order: number;
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
    order: 0,
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
  const bootstrapped = bootstrap(m, search, best, options);
  const every = Math.max(1, Math.ceil(wald.length / 400));
  const path = [...wald.keys()]
    .filter((i) => i % every === 0 || i === best || i === wald.length - 1)
    .map((i) => ({ rowsBefore: search.dates[i]!, wald: wald[i]! }));
  return { plain, ...bootstrapped, rowsBefore: search.dates[best]!, path, breaking, held };
}
