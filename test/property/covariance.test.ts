import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import {
  batches,
  calibrated,
  classical,
  combine,
  cosine,
  hac,
  jointly,
  type KernelName,
  neweyWest,
  white,
} from "../../src/covariance/index.js";
import type { CovarianceEstimator, Regression } from "../../src/estimate/index.js";
import { columnOf, symmetricEigenvalues } from "../../src/numeric/index.js";
import { digits } from "../support/digits.js";
import { autoregressive, regressionOf, standardErrors, unit } from "../unit/covariance/regression.js";

const options = { seed: 20_261, numRuns: 40 };

interface Subject {
  readonly T: number;
  readonly columns: Float64Array[];
  readonly y: Float64Array;
  readonly periods: number[];
}

/** Regressions of 25 to 90 periods on a constant and one to three series with memory, some with missing periods. */
const subjects = fc
  .record({
    T: fc.integer({ min: 25, max: 90 }),
    k: fc.integer({ min: 2, max: 4 }),
    seed: fc.integer({ min: 1, max: 1e6 }),
    rho: fc.double({ min: -0.7, max: 0.9, noNaN: true }),
    gaps: fc.array(fc.integer({ min: 1, max: 89 }), { maxLength: 3 }),
  })
  .map(({ T, k, seed, rho, gaps }): Subject => {
    const columns: Float64Array[] = [new Float64Array(T).fill(1)];
    for (let j = 1; j < k; j++) columns.push(autoregressive(T, rho, seed + j));
    const y = autoregressive(T, rho, seed).map((u, t) => u + (columns[1]?.[t] ?? 0));
    const periods: number[] = [];
    for (let t = 0, at = 0; t < T; t++, at++) {
      if (gaps.includes(t)) at += 1 + (t % 3);
      periods.push(at);
    }
    return { T, columns, y, periods };
  });

const put = ({ columns, y, periods }: Subject): Regression => regressionOf(columns, y, { periods });

const kernelNames: KernelName[] = [
  "truncated",
  "bartlett",
  "parzen",
  "tukey-hanning",
  "quadratic spectral",
  "daniell",
];
const kernelBandwidths = fc.record({
  kernel: fc.constantFrom(...kernelNames),
  bandwidth: fc.double({ min: 0.3, max: 24, noNaN: true }),
});

/** Estimators whose choices do not depend on the units of the data. */
const unitFree = (): CovarianceEstimator[] => [
  classical(),
  white("HC0"),
  white("HC2"),
  white("HC4"),
  neweyWest(),
  hac({ kernel: "parzen", bandwidth: 5.5 }),
  hac({ kernel: "quadratic spectral", bandwidth: 3 }),
  cosine(),
  batches(),
  calibrated({ errors: { ar: [0.5] } }),
];

test("a regressor in another unit, and the outcome in another: errors follow, t laws stay", () => {
  fc.assert(
    fc.property(
      subjects,
      fc.double({ min: -6, max: 6, noNaN: true }),
      fc.double({ min: -6, max: 6, noNaN: true }),
      (subject, p, q) => {
        const scale = 10 ** p;
        const outcome = 10 ** q;
        const one = put(subject);
        const other = put({
          ...subject,
          columns: subject.columns.map((column, j) => (j === 1 ? column.map((x) => x * scale) : column)),
          y: subject.y.map((v) => v * outcome),
        });
        for (const estimator of unitFree()) {
          const a = estimator.on(one);
          const b = estimator.on(other);
          const se = standardErrors(a.matrix);
          standardErrors(b.matrix).forEach((value, j) => {
            assert.ok(
              digits((value * (j === 1 ? scale : 1)) / outcome, se[j]!) > 9,
              `${estimator.label}, ${j}`,
            );
          });
          const law = a.reference(unit(one.k, 1)).critical(0.95);
          assert.ok(digits(b.reference(unit(one.k, 1)).critical(0.95), law) > 4);
        }
      },
    ),
    { ...options, numRuns: 15 },
  );
});

test("reordering the regressors reorders the matrix", () => {
  fc.assert(
    fc.property(subjects, kernelBandwidths, (subject, { kernel, bandwidth }) => {
      const one = put(subject);
      const k = one.k;
      const order = [k - 1, ...Array.from({ length: k - 1 }, (_, j) => j)];
      const other = put({ ...subject, columns: order.map((j) => subject.columns[j]!) });
      for (const estimator of [hac({ kernel, bandwidth }), white("HC3"), cosine(), batches()]) {
        const a = estimator.on(one).matrix.data;
        const b = estimator.on(other).matrix.data;
        for (let i = 0; i < k; i++) {
          for (let j = 0; j < k; j++) {
            const size = Math.sqrt(Math.abs(a[order[i]! * k + order[i]!]! * a[order[j]! * k + order[j]!]!));
            const difference = Math.abs(b[j * k + i]! - a[order[j]! * k + order[i]!]!);
            assert.ok(difference < 1e-9 * size + 1e-300, `${estimator.label} ${i} ${j}`);
          }
        }
      }
    }),
    options,
  );
});

test("every estimator is symmetric to the bit, and positive semidefinite where theory says so", () => {
  fc.assert(
    fc.property(subjects, kernelBandwidths, (subject, { kernel, bandwidth }) => {
      const m = put(subject);
      const positive = kernel !== "truncated" && kernel !== "tukey-hanning";
      for (const estimator of [
        hac({ kernel, bandwidth }),
        neweyWest(),
        white(),
        cosine(),
        batches(),
        classical(),
      ]) {
        const V = estimator.on(m).matrix;
        const scaled = { rows: m.k, columns: m.k, data: new Float64Array(m.k * m.k) };
        for (let i = 0; i < m.k; i++) {
          for (let j = 0; j < m.k; j++) {
            assert.equal(V.data[j * m.k + i], V.data[i * m.k + j]);
            scaled.data[j * m.k + i] =
              V.data[j * m.k + i]! / Math.sqrt(V.data[i * m.k + i]! * V.data[j * m.k + j]!);
          }
        }
        if (estimator.kind === "hac" && !positive) continue;
        assert.ok(symmetricEigenvalues(scaled)[m.k - 1]! > -1e-11, estimator.label);
      }
    }),
    options,
  );
});

test("Bartlett by moving sums is the sum over lags, at whole and broken bandwidths, with missing periods too", () => {
  fc.assert(
    fc.property(
      subjects,
      fc.double({ min: 1, max: 40, noNaN: true }),
      fc.boolean(),
      (subject, real, whole) => {
        const m = put(subject);
        const S = whole ? Math.round(real) : real;
        const span = m.periods[m.T - 1]! - m.periods[0]! + 1;
        if (S > span) return;
        // h_t = w_t û_t of the last coefficient, lags by period.
        const c = m.k - 1;
        const w = new Float64Array(m.T);
        for (let j = 0; j < m.k; j++) {
          const x = columnOf(m.X, j);
          for (let t = 0; t < m.T; t++) w[t]! += m.gramInverse.data[c * m.k + j]! * x[t]!;
        }
        let wanted = 0;
        for (let s = 0; s < m.T; s++) {
          for (let t = 0; t < m.T; t++) {
            const weight = Math.max(0, 1 - Math.abs(m.periods[s]! - m.periods[t]!) / S);
            wanted += weight * w[s]! * m.residuals[s]! * w[t]! * m.residuals[t]!;
          }
        }
        const found = hac({ bandwidth: S, factor: false }).on(m).matrix.data[c * m.k + c]!;
        assert.ok(Math.abs(found / wanted - 1) < 1e-9, `S = ${S}: ${found} against ${wanted}`);
      },
    ),
    options,
  );
});

test("no lags: Bartlett is HC0; the whole sample as bandwidth is allowed, more is not", () => {
  fc.assert(
    fc.property(subjects, (subject) => {
      const m = put(subject);
      const hc0 = standardErrors(white("HC0").on(m).matrix);
      standardErrors(neweyWest({ lags: 0, factor: false }).on(m).matrix).forEach((se, a) => {
        assert.ok(digits(se, hc0[a]!) > 12);
      });
      const span = m.periods[m.T - 1]! - m.periods[0]! + 1;
      assert.ok(hac({ bandwidth: span }).on(m).matrix.data[0]! > 0);
      assert.throws(() => hac({ bandwidth: span + 1 }).on(m), /longer than the sample/);
    }),
    options,
  );
});

test("p falls as |t| grows, is symmetric, and is 1 − level at the critical value", () => {
  fc.assert(
    fc.property(
      subjects,
      kernelBandwidths,
      fc.double({ min: 0.5, max: 0.995, noNaN: true }),
      (subject, { kernel, bandwidth }, level) => {
        const m = put(subject);
        for (const estimator of [
          hac({ kernel, bandwidth }),
          cosine(),
          calibrated({ errors: { ar: [0.4] } }),
        ]) {
          const law = estimator.on(m).reference(unit(m.k, m.k - 1));
          const c = law.critical(level);
          assert.ok(
            Math.abs(law.twoSided(c) / (1 - level) - 1) < 2e-3,
            `${law.name}: ${law.twoSided(c)} at ${level}`,
          );
          assert.equal(law.twoSided(-c), law.twoSided(c));
          let before = 1;
          for (const t of [0, 0.3, 1, 2, 3, 5, 9]) {
            const p = law.twoSided(t);
            assert.ok(p >= 0 && p <= 1 && p <= before + 1e-6, `${law.name} at ${t}: ${p}`);
            before = p;
          }
        }
      },
    ),
    { ...options, numRuns: 20 },
  );
});

test("a combination and its negative, and a joint test of both halves, agree", () => {
  fc.assert(
    fc.property(subjects, fc.double({ min: -3, max: 3, noNaN: true }), (subject, weight) => {
      const regression = put(subject);
      const estimator = neweyWest();
      const m = { regression, outcome: "y", level: 0.9, estimator, covariance: estimator.on(regression) };
      const a = combine(m, { x1: 1, intercept: weight });
      const b = combine(m, { x1: -1, intercept: -weight });
      assert.ok(Math.abs(a.estimate + b.estimate) < 1e-12 && Math.abs(a.se - b.se) < 1e-12);
      assert.ok(Math.abs(a.low + b.high) < 1e-9);
      assert.ok(a.low < a.high && a.low <= a.estimate && a.estimate <= a.high);
      const together = jointly({ ...m, estimator: cosine(), covariance: cosine().on(regression) }, [
        "x1",
        "intercept",
      ]);
      assert.ok(together.wald >= 0 && together.p >= 0 && together.p <= 1);
    }),
    { ...options, numRuns: 15 },
  );
});
