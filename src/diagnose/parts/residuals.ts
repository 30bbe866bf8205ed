import type { Regression } from "../../estimate/index.js";
import { columnOf, InputError } from "../../numeric/index.js";

const length = (v: Float64Array) => {
  let largest = 0;
  for (const x of v) largest = Math.max(largest, Math.abs(x));
  if (largest === 0) return 0;
  let sum = 0;
  for (const x of v) sum += (x / largest) ** 2;
  return largest * Math.sqrt(sum);
};

/** Whether the residuals are nothing but rounding: ‖ê‖ ≤ T·2⁻⁵²·‖y‖. */
export function isPerfectFit(m: Regression): boolean {
  return length(m.residuals) <= m.T * 2 ** -52 * length(m.y);
}

const scaled = new WeakMap<Regression, Float64Array>();

/**
 * The residuals scaled to a mean square of one: every test here is free of their unit, and fourth powers of very
 * small or large ones would under- or overflow. Refuses a perfect fit, for which no test is defined.
 */
export function unitResiduals(m: Regression, caller: string): Float64Array {
  if (isPerfectFit(m))
    throw new InputError(
      `${caller}: the regression fits its ${m.T} periods exactly (the residuals are rounding error), so nothing is ` +
        `left to test. Look for a term that repeats the outcome, or use fewer terms.`,
    );
  let unit = scaled.get(m);
  if (!unit) {
    const scale = Math.sqrt(m.T) / length(m.residuals);
    unit = m.residuals.map((e) => e * scale);
    scaled.set(m, unit);
  }
  return unit;
}

/** Whether a constant lies in the span of the terms: an intercept, or a full set of dummies. */
export function spansConstant(m: Regression): boolean {
  if (m.interceptAt >= 0) return true;
  const rest = new Float64Array(m.T).fill(1);
  for (let j = 0; j < m.k; j++) {
    const q = columnOf(m.Q, j);
    const weight = q.reduce((sum, x) => sum + x, 0);
    for (let t = 0; t < m.T; t++) rest[t]! -= weight * q[t]!;
  }
  return length(rest) < 1e-8 * Math.sqrt(m.T);
}

/** Values less their mean; all zero where only rounding is left. */
export function centred(values: Float64Array): Float64Array {
  const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
  const rest = values.map((x) => x - mean);
  return length(rest) <= values.length * 2 ** -52 * length(values) ? rest.fill(0) : rest;
}
