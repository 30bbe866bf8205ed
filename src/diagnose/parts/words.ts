import type { Test } from "../test.js";

/** A figure for a sentence: `digits` significant digits, a true minus sign, no exponent in the usual range. */
export function figure(x: number, digits = 3): string {
  if (!Number.isFinite(x)) return Number.isNaN(x) ? "undefined" : x > 0 ? "∞" : "−∞";
  if (x === 0) return "0";
  const size = Math.abs(x);
  if (size >= 1e6 || size < 1e-4) {
    const [mantissa, exponent] = x.toExponential(digits - 1).split("e");
    return `${mantissa}×10^${Number(exponent)}`.replaceAll("-", "−");
  }
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(size)));
  return x.toFixed(decimals).replace("-", "−");
}

/** A probability for a sentence: `p = 0.031`, `p < 0.001`. */
export function pValue(p: number): string {
  if (Number.isNaN(p)) return "p undefined";
  if (p < 0.001) return "p < 0.001";
  return p > 0.9995 ? "p > 0.999" : `p = ${p.toFixed(3)}`;
}

/** A test's figures for a sentence: `F(4, 171) = 4.64, p = 0.001`, `statistic 24.5, p = 0.106`. */
export function stated(test: Pick<Test, "distribution" | "statistic" | "p">): string {
  const value = figure(test.statistic);
  const lead = /^(F|χ²|t)\(/.test(test.distribution)
    ? `${test.distribution} = ${value}`
    : `statistic ${value}`;
  return `${lead}, ${pValue(test.p)}`;
}

/** `1 period`, `3 periods`. */
export function counted(n: number, one: string, many = `${one}s`): string {
  return `${n} ${n === 1 ? one : many}`;
}

/** `a`, `a and b`, `a, b and c`. */
export function listed(words: readonly string[]): string {
  if (words.length < 2) return words[0] ?? "";
  return `${words.slice(0, -1).join(", ")} and ${words[words.length - 1]}`;
}

/** Numbers for a JSON record: what is not finite becomes null. */
export function recordable(x: number): number | null {
  return Number.isFinite(x) ? x : null;
}
