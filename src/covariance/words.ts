/** `p = 0.031`, `p < 0.001`. */
export function pValue(p: number): string {
  if (Number.isNaN(p)) return "no p";
  if (p < 0.001) return "p < 0.001";
  return p > 0.9995 ? "p > 0.999" : `p = ${p.toFixed(3)}`;
}

/** A figure for a sentence: three significant digits, a true minus sign. */
export function figure(x: number): string {
  if (x === 0) return "0";
  const size = Math.abs(x);
  if (size >= 1e6 || size < 1e-4) return x.toExponential(2).replaceAll("-", "−");
  return x.toFixed(Math.max(0, 2 - Math.floor(Math.log10(size)))).replace("-", "−");
}

/** `95%`, `99.9%`. */
export function percent(level: number): string {
  return `${Number((100 * level).toPrecision(6))}%`;
}
