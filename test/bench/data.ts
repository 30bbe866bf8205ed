import { counterRandom, type Matrix, matrix } from "../../src/numeric/index.js";

/** An invented regression: an intercept, k − 1 autoregressive regressors, autoregressive errors. T rows. */
export function regressionData(T: number, k: number): { X: Matrix; y: Float64Array; u: Float64Array } {
  const X = matrix(T, k);
  X.data.fill(1, 0, T);
  for (let j = 1; j < k; j++) autoregression(X.data.subarray(j * T, (j + 1) * T), 0.7, j);
  const u = autoregression(new Float64Array(T), 0.5, k);
  const y = Float64Array.from(u);
  for (let j = 0; j < k; j++) for (let t = 0; t < T; t++) y[t]! += ((j % 3) - 1 || 2) * X.data[j * T + t]!;
  return { X, y, u };
}

function autoregression(values: Float64Array, rho: number, stream: number): Float64Array {
  counterRandom(2024, stream).fillNormal(values);
  for (let t = 1; t < values.length; t++) values[t]! += rho * values[t - 1]!;
  return values;
}
