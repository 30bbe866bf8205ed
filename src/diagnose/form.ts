import { about, Diagnostic, type DiagnosticFields } from "./diagnostic.js";
import { jarqueBera } from "./form/jarque-bera.js";
import { type PartialResiduals, partialResiduals } from "./form/partial-residuals.js";
import { type QuantilePoint, quantilePlot } from "./form/quantiles.js";
import { reset, robustReset } from "./form/reset.js";
import { unitResiduals } from "./parts/residuals.js";
import { figure, pValue, stated } from "./parts/words.js";
import type { Fitted } from "./subject.js";
import type { Test } from "./test.js";

/** Options of `form`. */
export interface FormOptions {
  /** Highest power of the fitted values in RESET; default 3. */
  readonly powers?: number;
  /** Seed of the simulated Jarque–Bera p-value; default 1. */
  readonly seed?: number;
  /** Draws of it; default 999. */
  readonly draws?: number;
}

interface FormFields extends DiagnosticFields {
  /** Whether powers of the fitted values still explain the outcome, by the robust form at 1 − level. */
  readonly bent: boolean;
  readonly decisive: Test | undefined;
  readonly skewness: number;
  /** 3 for the normal law. */
  readonly kurtosis: number;
  readonly quantiles: readonly QuantilePoint[];
  readonly partialResiduals: readonly PartialResiduals[];
}

/** Whether the terms enter a fit in the right shape, and what shape its residuals have. */
export class Form extends Diagnostic implements FormFields {
  override readonly kind = "form";
  declare readonly bent: boolean;
  declare readonly decisive: Test | undefined;
  declare readonly skewness: number;
  declare readonly kurtosis: number;
  declare readonly quantiles: readonly QuantilePoint[];
  declare readonly partialResiduals: readonly PartialResiduals[];

  constructor(fields: FormFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }
}

/**
 * Tests the shape of the regression: RESET plainly and by a Wald test robust to dependent and uneven errors (the
 * finding rests on the latter), Jarque–Bera with a simulated p-value, residual quantiles against the normal law with a
 * pointwise band, and partial residuals per term. Throws an InputError for a perfect fit.
 */
export function form(m: Fitted, options: FormOptions = {}): Form {
  const r = m.regression;
  unitResiduals(r, "form");
  const powers = options.powers ?? 3;
  const robust = robustReset(r, powers);
  const plain = [...new Set([2, powers])].map((highest) => reset(r, highest));
  const shape = jarqueBera(r, options.seed ?? 1, options.draws);
  const decisive = [robust, plain[plain.length - 1]!].find((test) => !Number.isNaN(test.p));
  const bent = decisive !== undefined && decisive.p < 1 - m.level;
  const tails = Number.isNaN(shape.test.p)
    ? ""
    : `; residual skewness ${figure(shape.skewness, 2)}, kurtosis ${figure(shape.kurtosis, 2)} (Jarque–Bera ${pValue(shape.test.p)})`;
  const lead = !decisive
    ? "The shape of the regression cannot be tested with powers of its fitted values"
    : bent
      ? `Powers of the fitted values still explain ${m.outcome}, so some term enters in the wrong shape: ${decisive.name}, ${stated(decisive)}`
      : `No bend found: ${decisive.name}, ${stated(decisive)}`;
  return new Form({
    ...about(m),
    seed: options.seed ?? 1,
    tests: [...plain, robust, shape.test],
    bent,
    decisive,
    skewness: shape.skewness,
    kurtosis: shape.kurtosis,
    quantiles: quantilePlot(r, m.level),
    partialResiduals: partialResiduals(r),
    finding: `${lead}${tails}.`,
    remarks: [],
  });
}
