import type { Fitted } from "../../../src/diagnose/index.js";
import type { Regression } from "../../../src/estimate/index.js";
import { fromColumns, orthonormalBasis, solveLeastSquares } from "../../../src/numeric/index.js";

/** A regression of `y` on columns, for tests: `periods` 0, 1, 2, ... and the first column the intercept unless said. */
export function regression(
  y: readonly number[] | Float64Array,
  columns: readonly (readonly number[] | Float64Array)[],
  more: {
    periods?: readonly number[];
    laggedOutcome?: boolean;
    intercept?: boolean;
    terms?: readonly string[];
  } = {},
): Regression {
  const X = fromColumns(columns);
  const outcome = Float64Array.from(y);
  const { coefficients, residuals, gramInverse } = solveLeastSquares(X, outcome);
  const Q = orthonormalBasis(X);
  const interceptAt = more.intercept === false ? -1 : 0;
  return {
    X,
    y: outcome,
    coefficients,
    residuals,
    gramInverse,
    Q,
    leverage: Float64Array.from({ length: X.rows }, (_, t) => {
      let h = 0;
      for (let j = 0; j < X.columns; j++) h += Q.data[j * X.rows + t]! ** 2;
      return h;
    }),
    rss: residuals.reduce((sum, e) => sum + e * e, 0),
    T: X.rows,
    k: X.columns,
    terms: more.terms ?? columns.map((_, j) => (j === interceptAt ? "intercept" : `x${j}`)),
    interceptAt,
    periods: Float64Array.from(more.periods ?? outcome.map((_, t) => t)),
    laggedOutcome: more.laggedOutcome ?? false,
  };
}

/** What `dependence` and its kin take, around a regression. */
export function fitted(
  m: Regression,
  step: Fitted["design"]["index"]["step"] = { unit: "integer", count: 1 },
): Fitted {
  return {
    regression: m,
    outcome: "y",
    level: 0.95,
    design: { index: { step, name: "time", ordinals: m.periods } },
  };
}

/** Whether two figures agree to `digits` significant digits (absolutely where the expected one is 0). */
export function agree(actual: number, expected: number, digits: number, what: string): void {
  const off = expected === 0 ? Math.abs(actual) : Math.abs(actual / expected - 1);
  if (!(off <= 10 ** -digits))
    throw new Error(`${what}: ${actual} against ${expected}, off by ${off.toExponential(1)}`);
}

/** White noise for tests: a small linear congruential generator and Box–Muller, seeded. */
export function noise(n: number, seed: number): Float64Array {
  let state = BigInt(seed) * 2862933555777941757n + 3037000493n;
  const uniform = () => {
    state = (state * 6364136223846793005n + 1442695040888963407n) & 0xffffffffffffffffn;
    return (Number(state >> 11n) + 0.5) / 2 ** 53;
  };
  return Float64Array.from(
    { length: n },
    () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform()),
  );
}
