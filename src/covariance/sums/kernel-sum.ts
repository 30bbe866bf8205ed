import type { Matrix } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";
import { bandSum } from "./band.js";
import { bartlettSum } from "./moving.js";
import type { Series } from "./series.js";
import { spectralSum } from "./spectral.js";

/** From this many lags on the transform is cheaper than the filter. */
const FILTERED_LAGS = 256;

/**
 * Σ_{|j| < n} κ(j/S) Σ_t v_t v'_{t−j}, not divided by n: Bartlett by moving sums at a cost that does not depend on S,
 * the others by a filter for few lags and by the Fourier transform for many.
 */
export function kernelSum(series: Series, kernel: Kernel, bandwidth: number): Matrix {
  const n = series.columns.rows;
  const last = lastLag(kernel, bandwidth, n);
  if (kernel.name === "bartlett" && last > 2) return bartlett(series, bandwidth);
  const weights = lagWeights(kernel, bandwidth, last);
  return last <= FILTERED_LAGS ? bandSum(series, weights) : spectralSum(series, weights);
}

/**
 * A bandwidth S between the whole numbers m and m + 1 weighs lags by a mean of their two triangles: both are straight
 * up to lag m, and the share (m + 1)(1 − m/S) of the second makes them meet at lag m too.
 */
function bartlett(series: Series, bandwidth: number): Matrix {
  const whole = Math.floor(bandwidth);
  const share = (whole + 1) * (1 - whole / bandwidth);
  if (share === 0) return bartlettSum(series, whole);
  const sum = bartlettSum(series, whole);
  const above = bartlettSum(series, whole + 1);
  for (let i = 0; i < sum.data.length; i++) sum.data[i] = (1 - share) * sum.data[i]! + share * above.data[i]!;
  return sum;
}
