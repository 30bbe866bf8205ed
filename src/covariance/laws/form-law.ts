import type { ReferenceLaw } from "../../estimate/index.js";
import { normal } from "../../numeric/index.js";
import { criticalValue, quadraticTail } from "./craig.js";
import { type Form, type Resolver, resolver } from "./krylov.js";

/** Relative error aimed at in the tail at a critical value, and how it may grow where p is small. */
const ERROR = 2e-4;

/**
 * The law of Z/√(factor · Q), Z standard normal and Q = Σ λχ²_1 with the eigenvalues of a form. As much of the spectrum is
 * resolved as the point asked about needs, and no more. Measured against all eigenvalues on 250 designs, kernels and bandwidths (T from
 * 30 to 400; iid, stationary, random-walk, seasonal and trend regressors): p near 5 % is right to 1e-4, critical values to 1e-3,
 * p near 0.1 % to 1.5 %, and the order of magnitude of what is smaller.
 */
export function formLaw(name: string, make: () => Form, factor: number, error = ERROR): ReferenceLaw {
  let prepared: { form: Form; resolve: Resolver } | undefined;
  const prepare = (): { form: Form; resolve: Resolver } => {
    if (!prepared) {
      const form = make();
      prepared = { form, resolve: resolver(form) };
    }
    return prepared;
  };
  const root = Math.sqrt(factor);
  // P(|Z| > c √(factor Q)) is the tail of the form itself beyond c √factor.
  const tail = (c: number): number => {
    if (c === 0) return 1;
    const { form, resolve } = prepare();
    const p = quadraticTail(c * root, resolve(roughCritical(0.05, form), error));
    return p > 1e-10 ? quadraticTail(c * root, resolve(c * root, allowed(p, error))) : p;
  };
  return lawOf(name, tail, (alpha) => {
    const { form, resolve } = prepare();
    const first = roughCritical(alpha, form);
    const before = resolve(first, error);
    const c = criticalValue((x) => quadraticTail(x, before), alpha, first);
    const after = resolve(c, error);
    return (after === before ? c : criticalValue((x) => quadraticTail(x, after), alpha, c)) / root;
  });
}

/** The relative error that a reader of this p can do with, where `error` will do at the usual levels. */
function allowed(p: number, error: number): number {
  if (p > 0.01) return error;
  return error * (p > 1e-3 ? 5 : p > 1e-5 ? 25 : p > 1e-8 ? 250 : 2500);
}

/** About where the critical value is, from the first two moments as degrees of freedom. */
function roughCritical(alpha: number, { sums }: Form): number {
  const df = sums.first ** 2 / sums.second;
  const z = normal.upperQuantile(alpha / 2);
  return (z + (z ** 3 + z) / (4 * df) + z ** 3 / (3 * df * df)) / Math.sqrt(sums.first);
}

/** A reference law from its two-sided tail alone. */
export function tailLaw(name: string, tail: (c: number) => number): ReferenceLaw {
  return lawOf(name, tail, (alpha) => criticalValue(tail, alpha));
}

/** A reference law from its two-sided tail and critical values; those asked for are kept. */
export function lawOf(
  name: string,
  tail: (c: number) => number,
  critical: (alpha: number) => number,
): ReferenceLaw {
  const found = new Map<number, number>();
  return {
    name,
    twoSided: (t) => (Number.isNaN(t) ? Number.NaN : tail(Math.abs(t))),
    critical(level) {
      let c = found.get(level);
      if (c === undefined) {
        c = critical(1 - level);
        found.set(level, c);
      }
      return c;
    },
  };
}
