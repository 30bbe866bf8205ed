import assert from "node:assert/strict";
import { test } from "node:test";
import { calibrated, neweyWest } from "../../../src/covariance/index.js";
import { kernels } from "../../../src/covariance/kernels.js";
import { dependentSpectrum } from "../../../src/covariance/laws/dependent.js";
import { missProbability } from "../../../src/covariance/laws/dependent-spectrum.js";
import { correlationOperator } from "../../../src/covariance/laws/error-process.js";
import { designFor } from "../../../src/covariance/laws/fixed-b.js";
import { limitLaw } from "../../../src/covariance/laws/limit.js";
import { fitAr1 } from "../../../src/covariance/rules/ar1-reml.js";
import { scoresOf } from "../../../src/covariance/scores.js";
import { fixture } from "../../root.js";
import { autoregressive, invented, regressionOf, unit } from "../../unit/covariance/regression.js";
import { caseRegression } from "./cases.js";

interface Calibrated {
  readonly calibrated_laws: readonly {
    design: string;
    T: number;
    k: number;
    rho: number;
    bandwidth: number;
    critical: number;
    miss: Record<string, number>;
    X?: number[][];
  }[];
  readonly designs: Record<string, { X: number[][]; y: number[] }>;
  readonly reml: { lake_huron: number; plain: number };
}

const own = fixture<Calibrated>("reference/covariance/covariance.json");
const { exact_location_rejection: location } = fixture<{
  exact_location_rejection: { data: [number, string, number, number, number, number, number][] };
}>("reference/covariance/constants.json");

test("the law under AR(1) errors against all T eigenvalues (make_covariance.py): 3 decimals", () => {
  let pending: (typeof own.calibrated_laws)[number][] = [];
  for (const law of own.calibrated_laws) {
    pending.push(law);
    if (!law.X) continue;
    const m = regressionOf(law.X, autoregressive(law.T, 0.3, law.T));
    for (const { rho, bandwidth, critical, miss, design, T, k } of pending) {
      const covariance = calibrated({ errors: { ar: rho === 0 ? [] : [rho] } }).on(m);
      assert.equal(covariance.details["bandwidth"], bandwidth);
      const root = Math.sqrt(covariance.details["factor"] as number);
      const reference = covariance.reference(unit(k, 1));
      const c = reference.critical(0.95) * root;
      assert.ok(
        Math.abs(c / critical - 1) < 2e-4,
        `${design}, T = ${T}, ρ = ${rho}: ${c} against ${critical}`,
      );
      for (const [at, wanted] of Object.entries(miss)) {
        const found = reference.twoSided(Number(at) / root);
        assert.ok(
          Math.abs(found - wanted) < 1e-4,
          `${design}, ρ = ${rho}, at ${at}: ${found} against ${wanted}`,
        );
      }
    }
    pending = [];
  }
});

test("exact rejection rates of Newey–West with fixed-b critical values in the AR(1) location model", () => {
  const rows = location.data.filter(([, name]) => name === "NW S=1.3sqrtT, fixed-b");
  assert.equal(rows.length, 2);
  for (const [T, , ...rates] of rows) {
    const scores = scoresOf(regressionOf([new Float64Array(T).fill(1)], autoregressive(T, 0.2, T)));
    const S = Math.ceil(1.3 * Math.sqrt(T));
    const c = limitLaw(kernels.bartlett, S / T, "").critical(0.95);
    [0, 0.3, 0.5, 0.7, 0.9].forEach((rho, i) => {
      const process = { ar: [rho], ma: [], label: "" };
      const omega = correlationOperator(process, T);
      const spectrum = dependentSpectrum(designFor(scores, unit(1, 0)), kernels.bartlett, S, omega, 60);
      const found = 100 * missProbability(c, spectrum);
      assert.ok(Math.abs(found - rates[i]!) < 0.011, `T = ${T}, ρ = ${rho}: ${found} against ${rates[i]}`);
    });
  }
});

test("ρ by restricted likelihood: LakeHuron, the fixture's dense likelihood and the rest of both", () => {
  const huron = fitAr1(scoresOf(caseRegression("lakehuron_trend"))).rho;
  assert.ok(Math.abs(huron - 0.8247674349) < 2e-7, `${huron}`);
  assert.ok(Math.abs(huron - own.reml.lake_huron) < 2e-7);
  const plain = own.designs["plain"]!;
  const rho = fitAr1(scoresOf(regressionOf(plain.X, plain.y))).rho;
  assert.ok(Math.abs(rho - own.reml.plain) < 1e-6, `${rho}`);
});

test("coverage of the calibrated interval is its level where its premise holds, and fixed-b's is the exact miss probability", () => {
  // One design with memory, errors AR(1) with ρ = 0.8 known to the estimator, 3,000 samples.
  const T = 70;
  const base = invented(T, 3, 77, 0.8);
  const columns = [0, 1, 2].map((j) => base.X.data.subarray(j * T, (j + 1) * T));
  const known = calibrated({ errors: { ar: [0.8] } });
  const replications = 3000;
  const critical = known.on(base).reference(unit(3, 1)).critical(0.95);
  const usual = neweyWest().on(base).reference(unit(3, 1)).critical(0.95);
  const predicted = known.on(base).reference(unit(3, 1)).twoSided(usual);
  let missed = 0;
  let missedUsual = 0;
  for (let r = 0; r < replications; r++) {
    const m = regressionOf(columns, autoregressive(T, 0.8, 10_000 + r));
    const se = Math.sqrt(neweyWest().on(m).matrix.data[4]!);
    const t = Math.abs(m.coefficients[1]!) / se;
    if (t > critical) missed++;
    if (t > usual) missedUsual++;
  }
  const error = (p: number): number => Math.sqrt((p * (1 - p)) / replications);
  assert.ok(Math.abs(missed / replications - 0.05) < 3 * error(0.05), `${missed / replications}`);
  assert.ok(
    Math.abs(missedUsual / replications - predicted) < 3 * error(predicted),
    `${missedUsual / replications} against ${predicted}`,
  );
  assert.ok(predicted > 0.08, "the premise of independent errors costs coverage here");
});
