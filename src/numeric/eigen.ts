import { EigenvalueDecomposition, Matrix as MlMatrix, SingularValueDecomposition } from "ml-matrix";
import { type Matrix, matrix } from "./matrix.js";

function toMl(a: Matrix): MlMatrix {
  const result = new MlMatrix(a.rows, a.columns);
  for (let i = 0; i < a.rows; i++)
    for (let j = 0; j < a.columns; j++) result.set(i, j, a.data[j * a.rows + i]!);
  return result;
}

/** Eigenvalues (largest first) and orthonormal eigenvectors (columns, in that order) of a symmetric matrix. */
export function symmetricEigen(a: Matrix): { values: Float64Array; vectors: Matrix } {
  const n = a.rows;
  const decomposition = new EigenvalueDecomposition(toMl(a), { assumeSymmetric: true });
  const order = decomposition.realEigenvalues.map((_, i) => i);
  order.sort((i, j) => decomposition.realEigenvalues[j]! - decomposition.realEigenvalues[i]!);
  const vectors = matrix(n, n);
  order.forEach((source, j) => {
    for (let i = 0; i < n; i++) vectors.data[j * n + i] = decomposition.eigenvectorMatrix.get(i, source);
  });
  return { values: Float64Array.from(order, (i) => decomposition.realEigenvalues[i]!), vectors };
}

/** Singular values, largest first. */
export function singularValues(a: Matrix): Float64Array {
  const wide = a.columns > a.rows;
  const decomposition = new SingularValueDecomposition(toMl(a), {
    computeLeftSingularVectors: false,
    computeRightSingularVectors: false,
    autoTranspose: wide,
  });
  return Float64Array.from(decomposition.diagonal);
}
