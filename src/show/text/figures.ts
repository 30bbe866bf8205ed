// U+2212, the true minus sign, is as wide as a plus sign and does not break from its figure.
const minus = "−";
const superscripts: Record<string, string> = Object.fromEntries(
  [..."0123456789-"].map((c, i) => [c, [..."⁰¹²³⁴⁵⁶⁷⁸⁹⁻"][i]!]),
);

/** How a number that could not be computed, or is missing, is written. */
export const absent = "–";

/** How a set of numbers is written: with so many decimals, and times a power of ten if that is not 0. */
export interface Scale {
  readonly decimals: number;
  readonly exponent: number;
}

/** The power of ten of the first significant digit. */
function magnitude(x: number): number {
  if (x === 0 || !Number.isFinite(x)) return 0;
  return Number(Math.abs(x).toExponential().split("e")[1]);
}

/**
 * Decimals that a standard error justifies: it is given two significant digits, three when it starts with a 1 (where two
 * would round it by up to 5 %). Negative where whole tens are not justified.
 */
export function justifiedDecimals(se: number): number {
  const [digits, power] = Math.abs(se).toExponential(1).split("e") as [string, string];
  return (digits.startsWith("1") ? 2 : 1) - Number(power);
}

/** A number at a scale: `1,234.5`, `−0.012`, `1.23×10⁻¹²`. Five whole digits and more are grouped in threes. */
export function written(x: number, scale: Scale): string {
  if (Number.isNaN(x)) return absent;
  if (!Number.isFinite(x)) return x > 0 ? "∞" : `${minus}∞`;
  const scaled = shifted(Math.abs(x), -scale.exponent);
  // toFixed turns to exponents at 1e21; whoever asks for so many digits gets them from the power of ten instead.
  if (scaled >= 1e21) return number(x);
  const [whole, part] = scaled.toFixed(Math.min(100, Math.max(0, scale.decimals))).split(".") as [
    string,
    string | undefined,
  ];
  const grouped = whole.length >= 5 ? whole.replace(/\B(?=(\d{3})+$)/g, ",") : whole;
  const figure = part === undefined ? grouped : `${grouped}.${part}`;
  const sign = x < 0 && /[1-9]/.test(figure) ? minus : "";
  return scale.exponent === 0 ? `${sign}${figure}` : `${sign}${figure}×10${raised(scale.exponent)}`;
}

// x·10^n by way of the decimal writing, which rounds once where a product would round twice.
function shifted(x: number, n: number): number {
  if (n === 0 || x === 0) return x;
  const [digits, power] = x.toExponential().split("e") as [string, string];
  return Number(`${digits}e${Number(power) + n}`);
}

function raised(n: number): string {
  return [...String(n)].map((c) => superscripts[c]!).join("");
}

/**
 * The scale for figures that are known as exactly as a standard error allows: estimate, standard error and both ends of
 * an interval are written alike. Powers of ten only where a reader would otherwise count zeros: below 0.001 with more
 * than eight decimals, or from 10⁹ on with a standard error of hundreds and more. Never more than twelve significant
 * digits.
 */
export function scaleFor(values: readonly number[], se: number): Scale {
  const largest = values.reduce((most, v) => (Number.isFinite(v) ? Math.max(most, Math.abs(v)) : most), 0);
  if (!(se > 0) || !Number.isFinite(se)) return scaleOf(largest, 6);
  const size = magnitude(Math.max(largest, se));
  const decimals = Math.min(justifiedDecimals(se), 11 - size);
  if ((decimals > 8 && size < -3) || (decimals < -2 && size >= 9) || size >= 15) {
    const exponent = 3 * Math.floor(size / 3);
    return { decimals: Math.max(0, decimals + exponent), exponent };
  }
  return { decimals: Math.max(0, decimals), exponent: 0 };
}

/** The scale that gives a number so many significant digits. */
export function scaleOf(x: number, digits: number): Scale {
  const size = magnitude(x);
  const decimals = digits - 1 - size;
  if (size < -5 || size >= 15) {
    const exponent = 3 * Math.floor(size / 3);
    return { decimals: Math.max(0, decimals + exponent), exponent };
  }
  return { decimals: Math.max(0, decimals), exponent: 0 };
}

// As rounded, a number may gain a digit (9.99 to 10.0); the largest of all would be rounded beyond what there is.
function rounded(x: number, digits: number): number {
  const near = Number(x.toPrecision(digits));
  return Number.isFinite(near) ? near : x;
}

/** A number that no standard error goes with, to `digits` significant digits, whole digits in full: `12.35`, `1,234,568`. */
export function number(x: number, digits = 4): string {
  if (!Number.isFinite(x)) return written(x, { decimals: 0, exponent: 0 });
  const scale = scaleOf(rounded(x, digits), digits);
  // 12.50 for an exact 12.5 claims nothing that 12.5 does not.
  let { decimals } = scale;
  const exact = (places: number) =>
    Number(`${Number(shifted(x, -scale.exponent).toFixed(places))}e${scale.exponent}`) === x;
  if (exact(decimals)) while (decimals > 0 && exact(decimals - 1)) decimals--;
  return written(x, { decimals, exponent: scale.exponent });
}

/** A test statistic or ratio to `digits` significant digits, kept also where the last are zeros: `14.20`. */
export function significant(x: number, digits = 4): string {
  if (!Number.isFinite(x)) return written(x, { decimals: 0, exponent: 0 });
  return written(x, scaleOf(rounded(x, digits), digits));
}

/** A p-value: `0.031`, `< 0.001`, `> 0.999`. */
export function pValue(p: number): string {
  if (Number.isNaN(p)) return absent;
  if (p < 0.001) return "< 0.001";
  if (p > 0.999) return "> 0.999";
  return p.toFixed(3);
}

/** A whole number, grouped: `1,000,000`. */
export function count(n: number): string {
  return written(n, { decimals: 0, exponent: 0 });
}

/** A share as a percentage with at least two figures: `2.4%`, `37%`, `< 0.1%`. Never 0% or 100% unless exact. */
export function percent(share: number): string {
  if (Number.isNaN(share)) return absent;
  const x = 100 * share;
  if (x === 0 || x === 100) return `${x}%`;
  if (x < 0.1) return "< 0.1%";
  if (x > 99.9) return "> 99.9%";
  return `${x < 10 || x > 99 ? x.toFixed(1) : x.toFixed(0)}%`;
}

/** A confidence level in words of a column: `95%`, `99.5%`. */
export function levelText(level: number): string {
  return `${Number((100 * level).toPrecision(6))}%`;
}
