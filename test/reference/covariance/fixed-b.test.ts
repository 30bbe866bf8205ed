import assert from "node:assert/strict";
import { test } from "node:test";
import { hac, type KernelName, neweyWest } from "../../../src/covariance/index.js";
import { kernels } from "../../../src/covariance/kernels.js";
import { drawsInLimit } from "../../../src/covariance/laws/joint-limit.js";
import { limitLaw } from "../../../src/covariance/laws/limit.js";
import { mixtureLaw } from "../../../src/covariance/laws/mixture.js";
import { fixture } from "../../root.js";
import { autoregressive, regressionOf, unit } from "../../unit/covariance/regression.js";

interface Laws {
  readonly own_design_laws: readonly {
    design: string;
    T: number;
    k: number;
    kernel: KernelName;
    bandwidth: number;
    critical: Record<string, number>;
    p: Record<string, number>;
    X?: number[][];
  }[];
  readonly limit_laws: readonly { kernel: KernelName; b: number; critical: number[] }[];
}

interface Constants {
  readonly fixed_b_t_critical_values: {
    data: Record<string, { b: number[]; onesided_levels: number[]; cv: number[][] }>;
  };
  readonly fixed_b_joint_F: {
    data: Record<
      string,
      Record<string, { b: number[]; levels: number[]; cvF: number[][]; mcse: number[][] }>
    >;
  };
}

const own = fixture<Laws>("reference/covariance/covariance.json");
const constants = fixture<Constants>("reference/covariance/constants.json");
const names: Record<string, KernelName> = {
  bartlett: "bartlett",
  parzen: "parzen",
  qs: "quadratic spectral",
  daniell: "daniell",
};

test("limit critical values of 4 kernels, 24 b and 5 levels (constants.json: exact eigenvalues, 4 decimals)", () => {
  let largest = 0;
  for (const [key, { b, onesided_levels, cv }] of Object.entries(constants.fixed_b_t_critical_values.data)) {
    b.forEach((value, i) => {
      const law = limitLaw(kernels[names[key]!], value, "");
      onesided_levels.forEach((level, j) => {
        const difference = Math.abs(law.critical(2 * level - 1) - cv[i]![j]!);
        largest = Math.max(largest, difference);
        // Measured: 4e-4 at most. The file states 1e-3.
        assert.ok(difference < 5e-4, `${key}, b = ${value}, ${level}: off by ${difference}`);
      });
    });
  }
  assert.ok(largest > 0);
});

test("limit critical values of make_covariance.py: dense grids of 1,000 and 2,000 points, all eigenvalues", () => {
  for (const { kernel, b, critical } of own.limit_laws) {
    const law = limitLaw(kernels[kernel], b, "");
    [0.9, 0.95, 0.99].forEach((level, i) => {
      // Measured: 2e-5 relative, from the part of the spectrum that Lanczos leaves in bundles.
      const relative = Math.abs(law.critical(level) / critical[i]! - 1);
      assert.ok(relative < 5e-5, `${kernel}, b = ${b}, ${level}: ${relative}`);
    });
  }
});

test("laws on the design at hand: critical values to 3 decimals, p to 4, against all eigenvalues (make_covariance.py)", () => {
  let pending: (typeof own.own_design_laws)[number][] = [];
  for (const law of own.own_design_laws) {
    pending.push(law);
    if (!law.X) continue;
    const m = regressionOf(law.X, autoregressive(law.T, 0.3, law.T));
    for (const { kernel, bandwidth, critical, p, design, T, k } of pending) {
      const found = hac({ kernel, bandwidth }).on(m);
      const reference = found.reference(unit(k, 1));
      // The fixture's law is of the statistic without a factor; with one the t ratio is shorter by its root.
      const root = Math.sqrt(found.details["factor"] as number);
      const where = `${design}, T = ${T}, ${kernel} ${bandwidth}`;
      for (const [level, c] of Object.entries(critical)) {
        const difference = Math.abs(reference.critical(Number(level)) * root - c);
        assert.ok(
          difference < (Number(level) > 0.95 ? 3e-3 : 1e-3) && difference < 1e-3 * c,
          `${where}: ${difference}`,
        );
      }
      for (const [c, tail] of Object.entries(p)) {
        const difference = Math.abs(reference.twoSided(Number(c) / root) - tail);
        assert.ok(
          difference < 1e-4 && difference < 0.02 * tail,
          `${where}, p at ${c}: ${difference} of ${tail}`,
        );
      }
    }
    pending = [];
  }
});

test("the slope of a trend: 2.52, 3.53 and 5.79 at b = 0.1, 0.3 and 1, where stationary regressors have 2.23, 2.85, 4.77", () => {
  // Figures of the project's methods page, by another implementation; at T = 1,000 they hold to their two decimals.
  const T = 1000;
  const trend = Float64Array.from({ length: T }, (_, t) => t);
  const m = regressionOf([new Float64Array(T).fill(1), trend], autoregressive(T, 0, 9));
  for (const [b, wanted] of [
    [0.1, 2.52],
    [0.3, 3.53],
    [1, 5.79],
  ] as const) {
    const law = hac({ bandwidth: b * T, factor: false })
      .on(m)
      .reference(unit(2, 1));
    assert.ok(Math.abs(law.critical(0.95) - wanted) < 0.015, `b = ${b}: ${law.critical(0.95)}`);
  }
});

test("joint limit: percentage points of Wald/q within four of the two simulations' standard errors", () => {
  let compared = 0;
  for (const [key, byQ] of Object.entries(constants.fixed_b_joint_F.data)) {
    for (const q of [2, 5]) {
      const { b, levels, cvF } = byQ[String(q)]!;
      for (const value of [0.05, 0.1, 0.3]) {
        const i = b.indexOf(value);
        const law = mixtureLaw("", q, () => drawsInLimit(kernels[names[key]!], value, q, 12_000));
        levels.forEach((level, j) => {
          // At the file's point the tail must be 1 − level. Its own error is that of 24,000 such draws.
          const wald = q * cvF[i]![j]!;
          const allowed = 4 * Math.sqrt(1.5) * law.standardError(wald);
          const difference = Math.abs(law.upper(wald) - (1 - level));
          assert.ok(
            difference < allowed,
            `${key}, q = ${q}, b = ${value}, ${level}: ${difference} > ${allowed}`,
          );
          compared++;
        });
      }
    }
  }
  assert.equal(compared, 3 * 2 * 3 * 3);
});

test("one restriction: the simulated joint law is the law of the t ratio squared", () => {
  const T = 90;
  const m = regressionOf([new Float64Array(T).fill(1), autoregressive(T, 0.7, 5)], autoregressive(T, 0.5, 6));
  const covariance = neweyWest().on(m);
  const t = covariance.reference(unit(2, 1));
  const joint = covariance.joint({ rows: 1, columns: 2, data: unit(2, 1) });
  for (const c of [1, 2, 3]) {
    const difference = Math.abs(joint.upper(c * c) - t.twoSided(c));
    assert.ok(
      difference < 4 * (joint as unknown as { standardError(w: number): number }).standardError(c * c),
    );
  }
});
