import assert from "node:assert/strict";
import { describe, test } from "node:test";
import type { BandwidthRule, WhiteType } from "../../../src/covariance/index.js";
import { batches, classical, cosine, hac, type KernelName, white } from "../../../src/covariance/index.js";
import type { CovarianceEstimator, Regression } from "../../../src/estimate/index.js";
import { fixture } from "../../root.js";
import { digits } from "../../support/digits.js";
import { regressionOf, standardErrors } from "../../unit/covariance/regression.js";

/*
 * Every estimator, kernel and rule against make_covariance.py: definitions in 40 digits (mpmath), no code shared. Digits
 * measured: at least 12.5 on the plain design, 10.2 on the one with scaled condition number 1e6.
 */
type Errors = readonly (number | null)[];

interface Hac {
  readonly kernel: KernelName;
  readonly rule: string;
  readonly prewhiten: boolean;
  readonly bandwidth: number;
  readonly se: Errors;
}

interface Designed {
  readonly X: readonly number[][];
  readonly y: readonly number[];
  readonly coefficients: readonly number[];
  readonly condition: number;
  readonly classical: Errors;
  readonly hac: readonly Hac[];
  readonly cosines: Readonly<Record<string, Errors>>;
  readonly batches: Readonly<Record<string, Errors>>;
  readonly gaps: {
    readonly kept: readonly number[];
    readonly cases: readonly { kernel: KernelName; bandwidth: number; se: Errors }[];
  };
}

const { designs } = fixture<{ designs: Record<string, Designed & Record<WhiteType, Errors>> }>(
  "reference/covariance/covariance.json",
);

function fewestDigits(m: Regression, estimator: CovarianceEstimator, wanted: Errors): number {
  const found = standardErrors(estimator.on(m).matrix);
  let fewest = 16;
  wanted.forEach((se, a) => {
    if (se === null)
      assert.ok(Number.isNaN(found[a]), `${estimator.label}: a negative variance is no number`);
    else fewest = Math.min(fewest, digits(found[a]!, se));
  });
  return fewest;
}

for (const [name, least] of [
  ["plain", 12.5],
  ["ill-conditioned", 10],
] as const) {
  describe(`${name} design`, () => {
    const expected = designs[name]!;
    const m = regressionOf(expected.X, expected.y);
    const check = (estimator: CovarianceEstimator, wanted: Errors, on: Regression = m): void => {
      const agreed = fewestDigits(on, estimator, wanted);
      assert.ok(agreed >= least, `${estimator.label}: ${agreed.toFixed(1)} digits`);
    };

    test("classical and White", () => {
      check(classical(), expected.classical);
      for (const type of ["HC0", "HC1", "HC2", "HC3", "HC4"] as const) check(white(type), expected[type]);
    });

    test("every kernel with every rule, prewhitened and not", () => {
      for (const { kernel, rule, prewhiten, bandwidth, se } of expected.hac) {
        const asked = Number.isNaN(Number(rule)) ? (rule as BandwidthRule) : Number(rule);
        const estimator = hac({ kernel, bandwidth: asked, prewhiten });
        const chosen = estimator.on(m).details["bandwidth"] as number;
        assert.ok(
          digits(chosen, bandwidth) > least,
          `${estimator.label}: bandwidth ${chosen}, not ${bandwidth}`,
        );
        check(estimator, se);
      }
    });

    test("cosines and batches", () => {
      for (const [terms, se] of Object.entries(expected.cosines)) check(cosine({ terms: Number(terms) }), se);
      for (const [length, se] of Object.entries(expected.batches))
        check(batches({ length: Number(length) }), se);
    });

    test("missing periods count in the lags and add nothing", () => {
      const { kept, cases } = expected.gaps;
      const gappy = regressionOf(
        expected.X.map((column) => kept.map((t) => column[t]!)),
        kept.map((t) => expected.y[t]!),
        { periods: kept },
      );
      for (const { kernel, bandwidth, se } of cases) check(hac({ kernel, bandwidth }), se, gappy);
    });
  });
}
