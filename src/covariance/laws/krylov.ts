import { dot, dotAt, scale } from "../shape/vectors.js";
import { Basis } from "./basis.js";
import { direction } from "./direction.js";
import { bundles, type PowerSums, type Spectrum } from "./spectrum.js";
import { tridiagonalEigenvalues } from "./tridiagonal.js";

/** A positive semidefinite operator A on the complement of some columns, with exact traces of its powers. */
export interface Form {
  readonly size: number;
  /** Dimension of the space that A acts on. */
  readonly rank: number;
  /** Writes A x to `out` for the x that starts at `from`. */
  readonly apply: (x: Float64Array, from: number, out: Float64Array) => void;
  /** Takes out of a vector, in place, what A does not act on. */
  readonly project: (x: Float64Array) => void;
  /** Σλ and Σλ². */
  readonly sums: PowerSums;
  /** What Σλ³ and Σλ⁴ are about, cheaply; absent where that is no guide. */
  readonly local?: () => PowerSums;
  /** All four, or the two where the others would cost too much. */
  readonly exact: () => PowerSums;
}

/** Resolves a form's spectrum as far as a tail beyond c needs it; asked again, it goes on from where it stopped. */
export type Resolver = (c: number, error: number) => Spectrum;

/** Fewer steps than this are never worth saving; on a short sample they cost nothing. */
const least = (size: number): number => (size <= 100 ? 12 : 3);
const MOST = 200;

/**
 * The spectrum of a form as far as asked: all of it in two bundles where a short bandwidth bears that, else by the Lanczos
 * process with full reorthogonalisation, from a fixed start, until what it has not reached cannot move the tail
 * beyond c by a share of more than `error` (see `resolved`).
 */
export function resolver(form: Form): Resolver {
  let process: Resolver | undefined;
  let bundled: Spectrum | undefined;
  return (c, error) => {
    if (!process) {
      // With the least third moment there is any sense in, before the local one is worked out.
      const { first, second } = form.sums;
      const hopeful = bearsBundling({ first, second, third: (1.1 * second ** 2) / first }, c, error);
      const sums = hopeful ? form.local?.() : undefined;
      if (sums && bearsBundling(sums, c, error)) {
        bundled ??= { leading: new Float64Array(), rest: bundles(sums) };
        return bundled;
      }
      process = lanczos(form);
    }
    return process(c, error);
  };
}

/**
 * Whether the whole spectrum may be bundled by moments that are only about right. What the third moment beyond the least possible one does
 * to the tail is of the relative order of c⁶ (Σλ³ − (Σλ²)²/Σλ)/12; a local third moment is off by a tenth of that (both measured).
 */
function bearsBundling({ first, second, third = 0 }: PowerSums, c: number, error: number): boolean {
  const effect = (c ** 6 * (third - second ** 2 / first)) / 12;
  return effect < 14 * error;
}

function lanczos(form: Form): Resolver {
  const { size } = form;
  const basis = new Basis(size);
  const diagonal: number[] = [];
  const side: number[] = [];
  const all = form.exact();
  const left = { ...all };
  const next = new Float64Array(size);
  let ready = start(form, basis, 0, next);
  let spectrum: Spectrum | undefined;
  return (c, error) => {
    let grown = false;
    while (ready && basis.count < MOST && !(basis.count >= least(size) && resolved(left, all, c, error))) {
      grown = true;
      const at = basis.add(next);
      form.apply(basis.data, at, next);
      const alpha = dotAt(basis.data, at, next, 0, size);
      diagonal.push(alpha);
      subtract(left, diagonal, side);
      basis.reduce(next);
      let beta = Math.sqrt(dot(next, next));
      if (beta < 1e-2 * alpha) {
        // Where most of the vector cancelled, rounding errors along the basis and outside the space are left.
        form.project(next);
        basis.reduce(next);
        beta = Math.sqrt(dot(next, next));
      }
      const coupled = beta > 1e-13 * all.first;
      side.push(coupled ? beta : 0);
      if (coupled) scale(next, 1 / beta);
      // An invariant subspace: the other copies of repeated eigenvalues are in its complement.
      else ready = start(form, basis, basis.count, next);
    }
    if (grown || !spectrum) spectrum = assemble(form.rank, all, diagonal, side);
    return spectrum;
  };
}

/**
 * Whether the rest of the spectrum may be replaced by two values. With four moments known the relative error of the tail is
 * of the order of a sharp power of c²λ for the largest λ left; with two, of c⁶ times the third moment that is guessed.
 * Both constants are measured.
 */
function resolved(left: PowerSums, all: PowerSums, c: number, error: number): boolean {
  if (!(left.first > 1e-12 * all.first) || left.second <= 0) return true;
  if (left.third !== undefined) {
    const largest = Math.max(...bundles(left).map(({ value }) => value));
    return c * c * largest < 3.2 * error ** (1 / 4);
  }
  return left.second ** 2 * c ** 6 < 12 * error * left.first;
}

/** Takes out of the power sums what the last row of the tridiagonal matrix adds to its traces. */
function subtract(left: { -readonly [P in keyof PowerSums]: PowerSums[P] }, d: number[], e: number[]): void {
  const m = d.length - 1;
  const a = d[m]!;
  const b = m > 0 ? e[m - 1]! : 0;
  const before = m > 0 ? d[m - 1]! : 0;
  const earlier = m > 1 ? e[m - 2]! : 0;
  const bb = b * b;
  left.first -= a;
  left.second -= a * a + 2 * bb;
  if (left.third !== undefined) left.third -= a ** 3 + 3 * bb * (a + before);
  if (left.fourth !== undefined) {
    left.fourth -=
      a ** 4 + 4 * bb * (a * a + a * before + before * before) + 2 * bb * bb + 4 * bb * earlier * earlier;
  }
}

function assemble(rank: number, all: PowerSums, diagonal: number[], side: number[]): Spectrum {
  const leading = Float64Array.from(diagonal);
  tridiagonalEigenvalues(leading, Float64Array.from(side));
  const left = { ...all };
  for (let i = 0; i < leading.length; i++) {
    const value = Math.max(0, leading[i]!);
    leading[i] = value;
    left.first -= value;
    left.second -= value ** 2;
    if (left.third !== undefined) left.third -= value ** 3;
    if (left.fourth !== undefined) left.fourth -= value ** 4;
  }
  const exhausted = leading.length >= rank || left.first <= 1e-12 * all.first || left.second <= 0;
  return { leading, rest: exhausted ? [] : bundles(left) };
}

/** Writes a unit vector in the form's space, orthogonal to the basis; false when there is none left. */
function start(form: Form, basis: Basis, replicate: number, out: Float64Array): boolean {
  if (basis.count >= form.rank) return false;
  out.set(direction(form.size, replicate));
  form.project(out);
  basis.reduce(out);
  basis.reduce(out);
  const length = Math.sqrt(dot(out, out));
  if (!(length > 1e-10)) return false;
  scale(out, 1 / length);
  return true;
}
