import { InputError } from "../../numeric/index.js";
import { type LagOperator, toeplitzOperator } from "./toeplitz.js";

/** A stationary error process, scaled to variance one. */
export interface ErrorProcess {
  /** `AR(1), ρ = 0.62`. */
  readonly label: string;
  readonly ar: readonly number[];
  readonly ma: readonly number[];
}

/** The correlation matrix Ω of the process over n calendar periods, as an operator. */
export function correlationOperator(process: ErrorProcess, n: number): LagOperator {
  const { ar, ma } = process;
  if (ar.length === 1 && ma.length === 0) return ar1Operator(ar[0]!, n);
  return toeplitzOperator(autocorrelations(process, n), n);
}

/** (Ωx)_t = Σ ρ^|t−s| x_s, by one recursion forward and one backward. */
function ar1Operator(rho: number, n: number): LagOperator {
  const apply = (x: Float64Array, from: number, out: Float64Array, outFrom: number): void => {
    let carried = 0;
    for (let t = 0; t < n; t++) {
      carried = rho * carried + x[from + t]!;
      out[outFrom + t] = carried;
    }
    carried = 0;
    for (let t = n - 1; t >= 0; t--) {
      out[outFrom + t]! += carried;
      carried = rho * (carried + x[from + t]!);
    }
  };
  return (x, from, out, outFrom, two) => {
    apply(x, from, out, outFrom);
    if (two) apply(x, from + n, out, outFrom + n);
  };
}

/**
 * Autocorrelations of an ARMA process at lags 0 to n − 1, from its moving-average weights ψ, summed until they have
 * died out.
 * @throws InputError when the autoregressive part is not stationary.
 */
export function autocorrelations({ ar, ma }: ErrorProcess, n: number): Float64Array {
  requireStationary(ar);
  const psi: number[] = [1];
  let quiet = 0;
  for (let j = 1; quiet < ar.length + 1; j++) {
    let value = ma[j - 1] ?? 0;
    for (let i = 1; i <= ar.length && i <= j; i++) value += ar[i - 1]! * psi[j - i]!;
    psi.push(value);
    quiet = j > ma.length && Math.abs(value) < 1e-17 ? quiet + 1 : 0;
    if (j > 200_000) break;
  }
  const order = Math.max(ar.length, ma.length) + 1;
  const gamma = new Float64Array(n);
  for (let lag = 0; lag < Math.min(n, order); lag++) {
    for (let j = 0; j + lag < psi.length; j++) gamma[lag]! += psi[j]! * psi[j + lag]!;
  }
  for (let lag = order; lag < n; lag++) {
    for (let i = 1; i <= ar.length; i++) gamma[lag]! += ar[i - 1]! * gamma[lag - i]!;
  }
  const variance = gamma[0]!;
  return gamma.map((value) => value / variance);
}

/** Stationary exactly when every partial autocorrelation lies inside (−1, 1): Durbin–Levinson backwards. */
export function requireStationary(ar: readonly number[]): void {
  let current = [...ar];
  while (current.length > 0) {
    const kappa = current[current.length - 1]!;
    if (!(Math.abs(kappa) < 1)) {
      throw new InputError(
        `calibrated: errors with autoregressive coefficients ${ar.join(", ")} are not stationary, so they have no ` +
          `correlation matrix. Give coefficients whose roots lie outside the unit circle.`,
      );
    }
    const shorter = current.slice(0, -1);
    const p = shorter.length;
    current = shorter.map((phi, i) => (phi + kappa * shorter[p - 1 - i]!) / (1 - kappa * kappa));
  }
}
