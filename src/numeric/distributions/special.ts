import { createRequire } from "node:module";

const require = createRequire(import.meta.url);

/** Loads one special function of @stdlib at its first use: together they would cost 150 ms at start. */
function lazily<F extends (...args: never[]) => number>(name: string): F {
  let loaded: F | undefined;
  return ((...args: Parameters<F>) => {
    loaded ??= require(name) as F;
    return loaded(...args);
  }) as F;
}

/** Regularised incomplete beta function I_x(a, b), or its complement. */
export const incompleteBeta = lazily<
  (x: number, a: number, b: number, regularized?: boolean, upper?: boolean) => number
>("@stdlib/math-base-special-betainc");

/** Regularised incomplete gamma function P(s, x), or its complement Q(s, x). */
export const incompleteGamma = lazily<
  (x: number, s: number, regularized?: boolean, upper?: boolean) => number
>("@stdlib/math-base-special-gammainc");

/** Complementary error function. */
export const erfc = lazily<(x: number) => number>("@stdlib/math-base-special-erfc");

/** Natural logarithm of the gamma function. */
export const logGamma = lazily<(x: number) => number>("@stdlib/math-base-special-gammaln");
