import assert from "node:assert/strict";
import { test } from "node:test";
import { kernels } from "../../../../src/covariance/kernels.js";
import { andrewsBandwidth, firstOrder } from "../../../../src/covariance/rules/andrews.js";
import { requireBandwidth } from "../../../../src/covariance/rules/bandwidth.js";
import {
  cosineTerms,
  cubeRootBandwidth,
  squareRootBandwidth,
} from "../../../../src/covariance/rules/growth.js";
import { neweyWest1994Bandwidth } from "../../../../src/covariance/rules/newey-west-1994.js";
import type { RawScores } from "../../../../src/covariance/rules/raw-scores.js";
import { autoregressive } from "../regression.js";

function scores(columns: readonly Float64Array[], weighted = columns.map(() => true)): RawScores {
  return {
    T: columns[0]!.length,
    terms: columns.map((_, a) => `x${a}`),
    weighted,
    column: (a) => columns[a]!,
  };
}

test("growth rules", () => {
  assert.equal(squareRootBandwidth(200), 19);
  assert.equal(squareRootBandwidth(100), 13);
  assert.equal(squareRootBandwidth(1e6), 1300);
  assert.ok(Math.abs(cubeRootBandwidth(1000) - 7.5) < 1e-12);
  assert.equal(cosineTerms(128, 5), 10);
  assert.equal(cosineTerms(192, 4), 13);
  assert.equal(cosineTerms(1000, 4), 40);
  assert.equal(cosineTerms(9, 8), 1);
});

test("α(q) of the plug-in equals Σ|j|^q Γ_j over Σ Γ_j, squared, for an AR(1) score", () => {
  // A long score whose fitted ρ is taken as the truth: the sums of its autocovariances have closed forms or run on.
  const series = autoregressive(400, 0.6, 3);
  const { rho } = firstOrder(series);
  for (const [kernel, q] of [
    [kernels.bartlett, 1],
    [kernels.parzen, 2],
  ] as const) {
    const { alpha, bandwidth } = andrewsBandwidth(kernel, scores([series]));
    let top = 0;
    let all = 1;
    for (let j = 1; j < 2000; j++) {
      top += 2 * j ** q * rho ** j;
      all += 2 * rho ** j;
    }
    assert.ok(Math.abs(alpha / (top / all) ** 2 - 1) < 1e-10, `α(${q})`);
    assert.ok(Math.abs(bandwidth / (kernel.constant * (alpha * 400) ** (1 / (2 * q + 1))) - 1) < 1e-14);
  }
});

test("the plug-in leaves unweighted scores out, caps ρ at 0.97 and says so", () => {
  const wild = Float64Array.from({ length: 80 }, (_, t) => 1000 + t);
  const tame = autoregressive(80, 0.3, 4);
  const alone = andrewsBandwidth(kernels.parzen, scores([tame]));
  const both = andrewsBandwidth(kernels.parzen, scores([wild, tame], [false, true]));
  assert.equal(both.bandwidth, alone.bandwidth);
  assert.ok(Number.isNaN(both.rho[0]));
  const capped = andrewsBandwidth(kernels.bartlett, scores([wild]));
  assert.deepEqual(capped.capped, ["x0"]);
  assert.ok(capped.rho[0]! > 0.97);
  const alpha = (4 * 0.97 ** 2) / (1 - 0.97 ** 2) ** 2;
  assert.ok(Math.abs(capped.alpha / alpha - 1) < 1e-10, "with one score α(1) = 4ρ²/(1 − ρ²)² at the cap");
});

test("scores without first-order dependence and scores that are all zero give bandwidth 0", () => {
  const alternating = Float64Array.from({ length: 40 }, (_, t) => [1, 1, -1, -1][t % 4]!);
  assert.ok(andrewsBandwidth(kernels.bartlett, scores([alternating])).bandwidth < 1);
  assert.equal(andrewsBandwidth(kernels.bartlett, scores([new Float64Array(40)])).bandwidth, 0);
});

test("pairs across missing periods are not neighbours", () => {
  const series = Float64Array.from([1, 2, 0, 4, 8, 16]);
  const observed = Uint8Array.from([1, 1, 0, 1, 1, 1]);
  const { rho, pairs } = firstOrder(series, observed);
  assert.equal(rho, 2);
  assert.equal(pairs, 3);
});

test("the plug-in in other units: rescaling all scores changes nothing, at extreme sizes either", () => {
  const a = autoregressive(100, 0.5, 5);
  const b = autoregressive(100, 0.8, 6);
  const one = andrewsBandwidth(kernels.parzen, scores([a, b])).bandwidth;
  for (const factor of [1e-90, 1e90]) {
    const other = andrewsBandwidth(
      kernels.parzen,
      scores([a.map((x) => x * factor), b.map((x) => x * factor)]),
    );
    assert.ok(Math.abs(other.bandwidth / one - 1) < 1e-12);
  }
});

test("Newey–West (1994): whole lags for Bartlett and Parzen, as it is for the quadratic spectral", () => {
  const series = autoregressive(150, 0.5, 7);
  const bartlett = neweyWest1994Bandwidth(kernels.bartlett, scores([series]));
  assert.ok(Number.isInteger(bartlett.bandwidth));
  assert.equal(bartlett.preTruncation, 4);
  assert.equal(bartlett.bandwidth, Math.floor(bartlett.gamma * Math.cbrt(150)) + 1);
  const spectral = neweyWest1994Bandwidth(kernels["quadratic spectral"], scores([series]));
  assert.ok(Math.abs(spectral.bandwidth - spectral.gamma * 150 ** 0.2) < 1e-12);
  // s(0) = σ_0 + 2σ_1 + ... vanishes for a score that its own past cancels.
  const cancelling = Float64Array.from({ length: 40 }, (_, t) => (t === 0 ? 1 : t === 39 ? -1 : 0));
  assert.ok(neweyWest1994Bandwidth(kernels.bartlett, scores([cancelling])).bandwidth >= 1);
});

test("what is no bandwidth is refused", () => {
  for (const bad of [-1, 0, Number.NaN, Number.POSITIVE_INFINITY]) {
    assert.throws(
      () => requireBandwidth(bad, kernels.bartlett, "hac"),
      /hac: a bandwidth is a number above 0/,
    );
  }
  assert.throws(
    () => requireBandwidth("andrew" as never, kernels.bartlett, "hac"),
    /Did you mean "andrews"\?/,
  );
  assert.throws(
    () => requireBandwidth("newey-west", kernels.daniell, "hac"),
    /give no rule for the Daniell kernel, only for Bartlett, Parzen and quadratic spectral/,
  );
});
