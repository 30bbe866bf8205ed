import { type Matrix, matrix } from "./matrix.js";

/** What `minimise` found. */
export interface Minimum {
  readonly x: Float64Array;
  readonly value: number;
  readonly gradient: Float64Array;
  readonly iterations: number;
  /** Whether the gradient, relative to the size of the value, fell below the tolerance. */
  readonly converged: boolean;
}

/** Options of `minimise`. */
export interface MinimiseOptions {
  /** Writes the gradient at x; central differences without it. */
  readonly gradient?: (x: Float64Array) => Float64Array;
  /** Largest |gradient| that counts as zero, relative to 1 + |value|. Default 1e-8. */
  readonly tolerance?: number;
  /** Default 200. */
  readonly mostIterations?: number;
}

/** A local minimum of f by the BFGS quasi-Newton method with a backtracking line search. */
export function minimise(
  f: (x: Float64Array) => number,
  start: ArrayLike<number>,
  options: MinimiseOptions = {},
): Minimum {
  const { tolerance = 1e-8, mostIterations = 200, gradient = (x) => centralGradient(f, x) } = options;
  const n = start.length;
  let x = Float64Array.from(start);
  let value = f(x);
  let g = gradient(x);
  let inverse = unit(n);
  let iterations = 0;
  for (; iterations < mostIterations; iterations++) {
    if (largest(g) <= tolerance * (1 + Math.abs(value))) break;
    let direction = product(inverse, g, -1);
    let slope = inner(direction, g);
    if (!(slope < 0)) {
      inverse = unit(n);
      direction = g.map((part) => -part);
      slope = -inner(g, g);
    }
    let step = 1;
    let next = x;
    let nextValue = Number.POSITIVE_INFINITY;
    for (let halving = 0; halving < 60; halving++) {
      next = x.map((part, i) => part + step * direction[i]!);
      nextValue = f(next);
      if (nextValue <= value + 1e-4 * step * slope) break;
      step /= 2;
    }
    if (!(nextValue < value)) break;
    const nextGradient = gradient(next);
    const s = next.map((part, i) => part - x[i]!);
    const y = nextGradient.map((part, i) => part - g[i]!);
    const curvature = inner(s, y);
    if (curvature > 1e-14 * Math.sqrt(inner(s, s) * inner(y, y)))
      update(inverse, s, y, curvature, iterations === 0);
    x = next;
    value = nextValue;
    g = nextGradient;
  }
  return { x, value, gradient: g, iterations, converged: largest(g) <= tolerance * (1 + Math.abs(value)) };
}

/** The k×k matrix of second derivatives of f at x, by central differences. */
export function hessian(f: (x: Float64Array) => number, x: ArrayLike<number>): Matrix {
  const n = x.length;
  const result = matrix(n, n);
  const steps = Float64Array.from({ length: n }, (_, i) => 1e-4 * Math.max(1, Math.abs(x[i]!)));
  const at = (i: number, a: number, j: number, b: number) => {
    const moved = Float64Array.from(x);
    moved[i]! += a * steps[i]!;
    moved[j]! += b * steps[j]!;
    return f(moved);
  };
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const value =
        (at(i, 1, j, 1) - at(i, 1, j, -1) - at(i, -1, j, 1) + at(i, -1, j, -1)) / (4 * steps[i]! * steps[j]!);
      result.data[i * n + j] = value;
      result.data[j * n + i] = value;
    }
  }
  return result;
}

function centralGradient(f: (x: Float64Array) => number, x: Float64Array): Float64Array {
  return x.map((value, i) => {
    const step = 6e-6 * Math.max(1, Math.abs(value));
    const moved = Float64Array.from(x);
    moved[i] = value + step;
    const above = f(moved);
    moved[i] = value - step;
    return (above - f(moved)) / (2 * step);
  });
}

function unit(n: number): Float64Array[] {
  return Array.from({ length: n }, (_, i) => Float64Array.from({ length: n }, (_, j) => (i === j ? 1 : 0)));
}

const inner = (a: Float64Array, b: Float64Array) => a.reduce((sum, part, i) => sum + part * b[i]!, 0);
const largest = (a: Float64Array) => a.reduce((size, part) => Math.max(size, Math.abs(part)), 0);
const product = (rows: Float64Array[], x: Float64Array, sign: number) =>
  Float64Array.from(rows, (row) => sign * inner(row, x));

function update(
  inverse: Float64Array[],
  s: Float64Array,
  y: Float64Array,
  curvature: number,
  first: boolean,
): void {
  const n = s.length;
  if (first) {
    const scale = curvature / inner(y, y);
    for (let i = 0; i < n; i++) inverse[i]![i] = scale;
  }
  const hy = product(inverse, y, 1);
  const factor = (1 + inner(y, hy) / curvature) / curvature;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      inverse[i]![j]! += factor * s[i]! * s[j]! - (hy[i]! * s[j]! + s[i]! * hy[j]!) / curvature;
    }
  }
}
