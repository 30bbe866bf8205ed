import { type Matrix, matrix } from "./matrix.js";
import { norm, solveUpper } from "./scaling.js";

/**
 * Columns that others reproduce. `dependent[i]` is a 0-based column, `combination[i]` the columns and weights
 * whose weighted sum it is.
 */
export class RankDeficient extends Error {
  override readonly name = "RankDeficient";
  constructor(
    readonly dependent: readonly number[],
    readonly combination: readonly (readonly { column: number; weight: number }[])[],
  ) {
    super(`the columns depend on one another (dependent: ${dependent.map((j) => j + 1).join(", ")})`);
  }
}

/**
 * Checks that the k columns whose triangle is R (k×k, from T rows) are independent: QR with column pivoting of R,
 * its columns brought to unit length; |r_jj| ≤ max(T, k) ε |r_11| counts as dependent. `scales` are the factors that
 * the columns were multiplied by, so that the combination holds for the originals. Throws RankDeficient.
 */
export function checkRank(r: Matrix, T: number, scales: Float64Array): void {
  const k = r.columns;
  const lengths = Float64Array.from({ length: k }, (_, j) => norm(r.data.subarray(j * k, (j + 1) * k)));
  const zero = lengths.indexOf(0);
  if (zero >= 0) throw new RankDeficient([zero], [[]]);
  const { triangle, order } = pivotedTriangle(r, lengths);
  const tolerance = Math.max(T, k) * Number.EPSILON * Math.abs(triangle.data[0]!);
  let rank = 0;
  while (rank < k && Math.abs(triangle.data[rank * k + rank]!) > tolerance) rank++;
  if (rank === k) return;
  const dependent: number[] = [];
  const combination: { column: number; weight: number }[][] = [];
  for (let j = rank; j < k; j++) {
    const target = order[j]!;
    const weights = solveUpper(triangle, triangle.data.subarray(j * k, j * k + rank), rank);
    dependent.push(target);
    combination.push(
      Array.from(weights, (w, i) => ({
        column: order[i]!,
        weight: (w * lengths[target]! * scales[order[i]!]!) / (lengths[order[i]!]! * scales[target]!),
        share: Math.abs(w),
      }))
        .filter(({ share }) => share > 1e-9)
        .map(({ column, weight }) => ({ column, weight })),
    );
  }
  throw new RankDeficient(dependent, combination);
}

function pivotedTriangle(r: Matrix, lengths: Float64Array): { triangle: Matrix; order: number[] } {
  const k = r.columns;
  const a = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) a.data[j * k + i] = r.data[j * k + i]! / lengths[j]!;
  }
  const order = Array.from({ length: k }, (_, j) => j);
  const column = (j: number) => a.data.subarray(j * k, (j + 1) * k);
  for (let step = 0; step < k; step++) {
    let best = step;
    let bestNorm = -1;
    for (let j = step; j < k; j++) {
      const size = norm(column(j).subarray(step));
      // A tie goes to the earlier column, so that what is named as dependent is the later one.
      if (size > bestNorm * (1 + 1e-10)) {
        best = j;
        bestNorm = size;
      }
    }
    if (best !== step) {
      const saved = Float64Array.from(column(step));
      column(step).set(column(best));
      column(best).set(saved);
      [order[step], order[best]] = [order[best]!, order[step]!];
    }
    reflect(a, step);
  }
  return { triangle: a, order };
}

function reflect(a: Matrix, step: number): void {
  const k = a.columns;
  const v = Float64Array.from(a.data.subarray(step * k + step, (step + 1) * k));
  const length = norm(v);
  if (length === 0) return;
  const alpha = v[0]! > 0 ? -length : length;
  v[0]! -= alpha;
  const half = -alpha * v[0]!;
  for (let j = step; j < k; j++) {
    const target = a.data.subarray(j * k + step, (j + 1) * k);
    let inner = 0;
    for (let i = 0; i < v.length; i++) inner += v[i]! * target[i]!;
    inner /= half;
    for (let i = 0; i < v.length; i++) target[i]! -= inner * v[i]!;
  }
}
