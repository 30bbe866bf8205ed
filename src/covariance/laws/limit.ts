import { columnOf, matrix } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import { designOf, hacForm } from "./design.js";
import { resolver } from "./krylov.js";
import { bundles, type Spectrum } from "./spectrum.js";

/** Spectra of the limit law on two grids, the second twice as fine. */
export interface LimitSpectra {
  readonly coarse: Spectrum;
  readonly fine: Spectrum;
}

const cache = new Map<string, LimitSpectra>();

/**
 * The limit of the fixed-b law (Kiefer and Vogelsang 2005, Econometric Theory 21) for regressors whose second
 * moments grow evenly: Q = ∫∫ κ((r − s)/b) dB(r) dB(s) over a Brownian bridge. Its eigenvalues are those of the
 * centred kernel matrix on a grid of N points, whose error falls as N⁻² (measured), so that two grids give the limit
 * by Richardson's rule. Kept per kernel and b.
 */
export function limitSpectra(kernel: Kernel, b: number): LimitSpectra {
  const key = `${kernel.name} ${b}`;
  let found = cache.get(key);
  if (!found) {
    found = b < 1e-3 ? smallBandwidth(kernel, b) : onGrids(kernel, b);
    if (cache.size > 500) cache.clear();
    cache.set(key, found);
  }
  return found;
}

function onGrids(kernel: Kernel, b: number): LimitSpectra {
  const points = Math.max(400, Math.ceil(10 / b));
  return { coarse: onGrid(kernel, b, points), fine: onGrid(kernel, b, 2 * points) };
}

function onGrid(kernel: Kernel, b: number, points: number): Spectrum {
  const constant = matrix(points, 1);
  columnOf(constant, 0).fill(1 / Math.sqrt(points));
  const design = designOf(columnOf(constant, 0), constant, points - 1);
  return resolver(hacForm(design, kernel, b * points))(40, 1e-10);
}

/** Where b is tiny the first two moments say all: Σλ = 1 − b∫κ, Σλ² = b∫κ², up to terms in b². */
function smallBandwidth(kernel: Kernel, b: number): LimitSpectra {
  const trace = 1 - b * kernel.integral;
  const square = b * kernel.squareIntegral;
  const spectrum = { leading: new Float64Array(), rest: bundles({ first: trace, second: square }) };
  return { coarse: spectrum, fine: spectrum };
}
