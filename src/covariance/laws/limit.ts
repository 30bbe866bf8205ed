import type { ReferenceLaw } from "../../estimate/index.js";
import { columnOf, matrix } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import { quadraticTail } from "./craig.js";
import { designOf, hacForm } from "./design.js";
import { formLaw, lawOf, tailLaw } from "./form-law.js";
import { type Form, resolver } from "./krylov.js";
import { bundles, type Spectrum } from "./spectrum.js";

/** The limit law on two grids, the second twice as fine. */
interface Limit {
  readonly law: ReferenceLaw;
  /** The spectrum on the finer grid, resolved for tails beyond c to a relative error. */
  spectrum(c: number, error: number): Spectrum;
}

const cache = new Map<string, Limit>();
/** Relative error of the tail on either grid. With a long bandwidth there are few eigenvalues, so that more costs nothing. */
const errorAt = (b: number): number => (b > 0.08 ? 1e-8 : 1e-5);
/** Below this b two moments say all. */
const SMALL = 1e-3;

/**
 * The limit of the fixed-b law (Kiefer and Vogelsang 2005, Econometric Theory 21) for regressors whose second
 * moments grow evenly: Q = ∫∫ κ((r − s)/b) dB(r) dB(s) over a Brownian bridge. Its eigenvalues are those of the
 * centred kernel matrix on a grid of N points, whose error falls as N⁻² (measured), so that two grids give the limit
 * by Richardson's rule. Kept per kernel and b.
 *
 * @param b at most 1.
 */
export function limitOf(kernel: Kernel, b: number): Limit {
  const key = `${kernel.name} ${b}`;
  let found = cache.get(key);
  if (!found) {
    found = b < SMALL ? smallBandwidth(kernel, b) : onGrids(kernel, b);
    if (cache.size > 500) cache.clear();
    cache.set(key, found);
  }
  return found;
}

function onGrids(kernel: Kernel, b: number): Limit {
  const error = errorAt(b);
  const points = Math.max(400, Math.ceil(10 / b));
  const coarse = formLaw("", () => gridForm(kernel, b, points), 1, error);
  let form: Form | undefined;
  const fineForm = (): Form => {
    form ??= gridForm(kernel, b, 2 * points);
    return form;
  };
  const fine = formLaw("", fineForm, 1, error);
  const extrapolated = (t: number): number => {
    const p = fine.twoSided(t);
    return p * (p / coarse.twoSided(t)) ** (1 / 3);
  };
  return {
    law: tailLaw("", extrapolated),
    spectrum: (c, wanted) => resolver(fineForm())(c, wanted),
  };
}

function gridForm(kernel: Kernel, b: number, points: number): Form {
  const constant = matrix(points, 1);
  columnOf(constant, 0).fill(1 / Math.sqrt(points));
  return hacForm(designOf(constant.data, constant, points - 1), kernel, b * points, true);
}

/** Σλ = 1 − b∫κ and Σλ² = b∫κ², up to terms in b². */
function smallBandwidth(kernel: Kernel, b: number): Limit {
  const sums = { first: 1 - b * kernel.integral, second: b * kernel.squareIntegral };
  const spectrum: Spectrum = { leading: new Float64Array(), rest: bundles(sums) };
  return { law: tailLaw("", (c) => quadraticTail(c, spectrum)), spectrum: () => spectrum };
}

/** The limit law under a name of its own. */
export function limitLaw(kernel: Kernel, b: number, name: string): ReferenceLaw {
  return lawOf(
    name,
    (c) => limitOf(kernel, b).law.twoSided(c),
    (alpha) => limitOf(kernel, b).law.critical(1 - alpha),
  );
}
