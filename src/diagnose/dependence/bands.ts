import { normal } from "../../numeric/index.js";
import { rowsEarlier } from "../parts/time.js";
import type { Correlations } from "./correlogram.js";

/** Half-widths of bands about zero at lags 1 .. n, at one confidence level. */
export interface Bands {
  /** White noise: z/√T (across gaps z·√((span − j)/(span·pairs))). */
  readonly white: Float64Array;
  /** Bartlett's formula for a moving average of order j−1: z·√((1 + 2Σ_{i<j} rᵢ²)/T), widened across gaps as above. */
  readonly bartlett: Float64Array;
  /** Uncorrelated errors of uneven variance: z·√(Σ ê(t)²ê(t−j)²)/Σê² (Taylor 1984), scaled like rⱼ across gaps. */
  readonly uneven: Float64Array;
}

/** Bands for the autocorrelations of `values`, at confidence `level`. */
export function correlogramBands(
  values: Float64Array,
  periods: Float64Array,
  { r, pairs, span, T }: Correlations,
  level: number,
): Bands {
  const z = normal.upperQuantile((1 - level) / 2);
  const n = r.length;
  const white = new Float64Array(n);
  const bartlett = new Float64Array(n);
  const uneven = new Float64Array(n);
  const squares = values.map((e) => e * e);
  const total = squares.reduce((sum, x) => sum + x, 0);
  let earlier = 0;
  for (let lag = 1; lag <= n; lag++) {
    const i = lag - 1;
    white[i] = z * Math.sqrt((span - lag) / (span * pairs[i]!));
    bartlett[i] = white[i]! * Math.sqrt(1 + 2 * earlier);
    let products = 0;
    const rows = rowsEarlier(periods, lag);
    for (let t = 0; t < T; t++) if (rows[t]! >= 0) products += squares[t]! * squares[rows[t]!]!;
    uneven[i] = (z * Math.sqrt(products) * T * (span - lag)) / (total * span * pairs[i]!);
    if (r[i]! * r[i]! >= 0) earlier += r[i]! * r[i]!;
  }
  return { white, bartlett, uneven };
}
