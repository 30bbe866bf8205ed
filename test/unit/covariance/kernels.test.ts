import assert from "node:assert/strict";
import { test } from "node:test";
import { kernelNamed, kernels, lagWeights, lastLag } from "../../../src/covariance/kernels.js";
import { gaussLegendre, matrix, symmetricEigenvalues } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";

const all = Object.values(kernels);

/** ∫ f over the kernel's support, 2 × (0, end) in panels. */
function twiceIntegral(f: (x: number) => number, end: number): number {
  let sum = 0;
  const width = 0.25;
  for (let from = 0; from < end; from += width) {
    const { nodes, weights } = gaussLegendre(16, from, from + width);
    for (let i = 0; i < nodes.length; i++) sum += weights[i]! * f(nodes[i]!);
  }
  return 2 * sum;
}

test("∫κ and ∫κ² by quadrature", () => {
  for (const kernel of all) {
    // The tails of the two that do not end are those of sin²/x² and of cos²/x⁴: their mean is added.
    const end = kernel.finite ? 1 : 2000;
    const tail = kernel.name === "daniell" ? 1 / (Math.PI ** 2 * end) : 0;
    const squares = twiceIntegral((x) => kernel.weight(x) ** 2, end) + tail;
    assert.ok(Math.abs(squares - kernel.squareIntegral) < 1e-7, `${kernel.name}: ∫κ² = ${squares}`);
    if (!kernel.finite) continue;
    const integral = twiceIntegral((x) => kernel.weight(x), 1);
    assert.ok(Math.abs(integral - kernel.integral) < 1e-12, `${kernel.name}: ∫κ = ${integral}`);
  }
  // For those two, ∫κ is the spectral window at zero: the mean of ∫ up to T over many T.
  for (const [kernel, period] of [
    [kernels["quadratic spectral"], 5 / 3],
    [kernels.daniell, 2],
  ] as const) {
    let mean = 0;
    for (let i = 0; i < 40; i++) mean += twiceIntegral((x) => kernel.weight(x), 200 + (period * i) / 40) / 40;
    assert.ok(Math.abs(mean - kernel.integral) < 1e-3, `${kernel.name}: ∫κ = ${mean}`);
  }
});

test("curvature at zero by the limit, and the plug-in constants to the four decimals printed", () => {
  for (const { name, order, curvature, weight, squareIntegral, constant } of all) {
    if (order === undefined) continue;
    const x = order === 1 ? 1e-6 : 1e-3;
    assert.ok(Math.abs((1 - weight(x)) / x ** order / curvature - 1) < 1e-2, name);
    const exact = ((order * curvature ** 2) / squareIntegral) ** (1 / (2 * order + 1));
    assert.equal(constant, Number(exact.toFixed(4)), name);
  }
  assert.equal(kernels.truncated.constant, Number((1.32212005838589 / 2).toFixed(4)));
});

test("constants of constants.json", () => {
  const { kernels: table } = fixture<{
    kernels: {
      data: Record<string, { q: number | null; kq: number; int_k2: number; c: number; psd: boolean }>;
    };
  }>("reference/covariance/constants.json");
  const names = {
    bartlett: "bartlett",
    parzen: "parzen",
    tukey_hanning: "tukey-hanning",
    qs: "quadratic spectral",
  };
  for (const [key, name] of Object.entries({ ...names, daniell: "daniell", truncated: "truncated" })) {
    const expected = table.data[key]!;
    const kernel = kernels[name as keyof typeof kernels];
    assert.equal(kernel.order ?? null, expected.q);
    assert.ok(Math.abs(kernel.curvature - expected.kq) < 1e-14);
    assert.ok(Math.abs(kernel.squareIntegral - expected.int_k2) < 1e-14);
    assert.ok(Math.abs(kernel.constant - expected.c) < 5e-5);
    assert.equal(kernel.positive, expected.psd);
  }
});

test("positive semidefinite where said, and not where not: eigenvalues of 60×60 weight matrices", () => {
  for (const kernel of all) {
    let least = 0;
    for (const bandwidth of [2.5, 4, 7.3, 15]) {
      const W = matrix(60, 60);
      for (let i = 0; i < 60; i++) {
        for (let j = 0; j < 60; j++)
          W.data[j * 60 + i] = i === j ? 1 : kernel.weight(Math.abs(i - j) / bandwidth);
      }
      least = Math.min(least, symmetricEigenvalues(W)[59]!);
    }
    assert.equal(least > -1e-6, kernel.positive, `${kernel.name}: least eigenvalue ${least}`);
  }
});

test("the quadratic spectral weight is smooth where its series ends", () => {
  const { weight } = kernels["quadratic spectral"];
  const edge = (0.3 * 5) / (6 * Math.PI);
  assert.ok(Math.abs(weight(edge * (1 - 1e-9)) - weight(edge * (1 + 1e-9))) < 1e-10);
  assert.equal(weight(0), 1);
});

test("the last lag that weighs, and weights at bandwidths that weigh none", () => {
  assert.equal(lastLag(kernels.bartlett, 19, 200), 18);
  assert.equal(lastLag(kernels.bartlett, 9.3, 200), 9);
  assert.equal(lastLag(kernels.bartlett, 0.7, 200), 0);
  assert.equal(lastLag(kernels.truncated, 4, 200), 4);
  assert.equal(lastLag(kernels.truncated, 4.9, 200), 4);
  assert.equal(lastLag(kernels.daniell, 0.5, 200), 199);
  assert.equal(lastLag(kernels.parzen, 500, 200), 199);
  assert.deepEqual([...lagWeights(kernels.bartlett, 1, 2)], [1, 0, 0]);
  assert.deepEqual([...lagWeights(kernels.bartlett, 0, 1)], [1, 0]);
});

test("an unknown kernel is refused with the nearest name", () => {
  assert.throws(() => kernelNamed("barlett", "hac"), {
    name: "InputError",
    message: 'hac: there is no kernel "barlett". Did you mean "bartlett"?',
  });
  assert.throws(() => kernelNamed("toString", "hac"), /There are: "truncated"/);
});
