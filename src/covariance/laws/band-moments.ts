import { type Kernel, lagWeights, lastLag } from "../kernels.js";
import { dot, dotAt } from "../shape/vectors.js";
import { boxBand, productBand } from "./band-rows.js";
import { type ContrastDesign, imagesOf } from "./design.js";
import { type LagOperator, lagOperator, toeplitzOperator } from "./toeplitz.js";

/** Above this many products a period the moments cost more than the eigenvalues they save. */
const AFFORDABLE = 4000;
/** Lags of the quadratic spectral kernel that the third and fourth moments take in, in bandwidths. */
const REACH = 3;

/**
 * tr(A³) and tr(A⁴) for A = M D K D M, or nothing where they would cost too much. Exact for kernels that end at the
 * bandwidth; for the quadratic spectral kernel lags beyond three bandwidths are left out, which moves them by less than
 * two percent. The Daniell kernel dies out too slowly for that and gets none.
 *
 * KD²K is formed along its band: with A₀ = DKD, tr(A₀³) = Σ w_s²w_t² κ_{s−t} (KD²K)_{st} and tr(A₀⁴) = Σ w_s²w_t² (KD²K)²_{st}; the
 * projection is taken care of by the k×k matrices Q'A₀ⁿQ.
 *
 * @param images A₀Q.
 */
export function higherMoments(
  design: ContrastDesign,
  kernel: Kernel,
  bandwidth: number,
  images: Float64Array,
): { third: number; fourth: number } | undefined {
  const { basis } = design;
  const squares = design.squares();
  const n = squares.length;
  if (kernel.name === "daniell") return undefined;
  const reach = kernel.finite ? lastLag(kernel, bandwidth, n) : Math.ceil(REACH * bandwidth);
  const last = Math.min(n - 1, reach);
  const boxes = kernel.name === "bartlett" && last > 12;
  if ((boxes ? 8 * last : 2 * last * last) > AFFORDABLE) return undefined;
  const row = lagWeights(kernel, bandwidth, last);
  const raw = boxes ? boxBand(squares, bandwidth, last) : productBand(squares, row);
  let { third, fourth } = raw;
  if (basis.columns > 0) {
    const K = kernel.finite ? lagOperator(kernel, bandwidth, n) : toeplitzOperator(row, n);
    const G = projected(design, K, images);
    third += -3 * G.trace3 + 3 * G.trace21 - G.trace111;
    fourth += -4 * G.trace4 + 4 * G.trace31 + 2 * G.trace22 - 4 * G.trace211 + G.trace1111;
  }
  return { third, fourth };
}

interface Projected {
  trace3: number;
  trace4: number;
  trace21: number;
  trace31: number;
  trace22: number;
  trace111: number;
  trace211: number;
  trace1111: number;
}

/** Traces of products of G_n = Q'A₀ⁿQ, given A₀Q. */
function projected(design: ContrastDesign, K: LagOperator, once: Float64Array): Projected {
  const { rows: n, columns: k, data: q } = design.basis;
  const twice = imagesOf(design, K, once);
  const G1 = products(q, once, n, k);
  const G2 = products(once, once, n, k);
  const G3 = products(once, twice, n, k);
  const trace4 = dot(twice, twice);
  const G11 = square(G1, k);
  let trace3 = 0;
  for (let j = 0; j < k; j++) trace3 += G3[j * k + j]!;
  return {
    trace3,
    trace4,
    trace21: dot(G2, G1),
    trace31: dot(G3, G1),
    trace22: dot(G2, G2),
    trace111: dot(G11, G1),
    trace211: dot(G2, G11),
    trace1111: dot(G11, G11),
  };
}

/** a'b for k columns each of n entries, symmetric. */
function products(a: Float64Array, b: Float64Array, n: number, k: number): Float64Array {
  const result = new Float64Array(k * k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) result[j * k + i] = result[i * k + j] = dotAt(a, i * n, b, j * n, n);
  }
  return result;
}

function square(G: Float64Array, k: number): Float64Array {
  const result = new Float64Array(k * k);
  for (let j = 0; j < k; j++) {
    for (let l = 0; l < k; l++) {
      for (let i = 0; i < k; i++) result[j * k + i]! += G[l * k + i]! * G[j * k + l]!;
    }
  }
  return result;
}
