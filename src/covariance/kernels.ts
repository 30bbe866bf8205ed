import { suggestion } from "../data/index.js";
import { InputError } from "../numeric/index.js";

export type KernelName =
  | "truncated"
  | "bartlett"
  | "parzen"
  | "tukey-hanning"
  | "quadratic spectral"
  | "daniell";

/**
 * A lag window: the weight of lag j is `weight(j / S)` at bandwidth S. Definitions and constants after
 * Andrews (1991), Econometrica 59, equations 2.7 and 6.2.
 */
export interface Kernel {
  readonly name: KernelName;
  /** As a label writes it: `Bartlett`. */
  readonly title: string;
  /** κ(x) for x ≥ 0; κ(0) = 1. */
  weight(x: number): number;
  /** Whether κ vanishes beyond x = 1. */
  readonly finite: boolean;
  /** Whether every sample gives a positive semidefinite sum. */
  readonly positive: boolean;
  /** The order q of smoothness at zero, 1 or 2; absent for the truncated kernel. */
  readonly order?: 1 | 2;
  /** lim (1 − κ(x)) / |x|^q at zero. */
  readonly curvature: number;
  /** ∫κ over the whole line. */
  readonly integral: number;
  /** ∫κ² over the whole line. */
  readonly squareIntegral: number;
  /**
   * The constant of the plug-in rules, (q κ_q² / ∫κ²)^(1/(2q+1)), to the four decimals that Andrews prints and everyone uses; for the
   * truncated kernel half that of the quadratic spectral one.
   */
  readonly constant: number;
}

/** 3 (sin d / d − cos d) / d², by its series where the difference cancels. */
function quadraticSpectral(x: number): number {
  const d = (6 * Math.PI * x) / 5;
  if (d < 0.3) {
    const s = d * d;
    return 1 - (s / 10) * (1 - (s / 28) * (1 - (s / 54) * (1 - (s / 88) * (1 - s / 130))));
  }
  return (3 / (d * d)) * (Math.sin(d) / d - Math.cos(d));
}

function parzen(x: number): number {
  if (x >= 1) return 0;
  if (x > 0.5) return 2 * (1 - x) ** 3;
  return 1 - 6 * x * x * (1 - x);
}

export const kernels: Readonly<Record<KernelName, Kernel>> = {
  truncated: {
    name: "truncated",
    title: "truncated",
    weight: (x) => (x <= 1 ? 1 : 0),
    finite: true,
    positive: false,
    curvature: 0,
    integral: 2,
    squareIntegral: 2,
    constant: 0.6611,
  },
  bartlett: {
    name: "bartlett",
    title: "Bartlett",
    weight: (x) => (x < 1 ? 1 - x : 0),
    finite: true,
    positive: true,
    order: 1,
    curvature: 1,
    integral: 1,
    squareIntegral: 2 / 3,
    constant: 1.1447,
  },
  parzen: {
    name: "parzen",
    title: "Parzen",
    weight: parzen,
    finite: true,
    positive: true,
    order: 2,
    curvature: 6,
    integral: 3 / 4,
    squareIntegral: 151 / 280,
    constant: 2.6614,
  },
  "tukey-hanning": {
    name: "tukey-hanning",
    title: "Tukey–Hanning",
    weight: (x) => (x < 1 ? Math.cos((Math.PI * x) / 2) ** 2 : 0),
    finite: true,
    positive: false,
    order: 2,
    curvature: Math.PI ** 2 / 4,
    integral: 1,
    squareIntegral: 3 / 4,
    constant: 1.7462,
  },
  "quadratic spectral": {
    name: "quadratic spectral",
    title: "quadratic spectral",
    weight: quadraticSpectral,
    finite: false,
    positive: true,
    order: 2,
    curvature: (18 * Math.PI ** 2) / 125,
    integral: 5 / 4,
    squareIntegral: 1,
    constant: 1.3221,
  },
  daniell: {
    name: "daniell",
    title: "Daniell",
    weight: (x) => (x === 0 ? 1 : Math.sin(Math.PI * x) / (Math.PI * x)),
    finite: false,
    positive: true,
    order: 2,
    curvature: Math.PI ** 2 / 6,
    integral: 1,
    squareIntegral: 1,
    constant: 1.4017,
  },
};

/** The kernel of that name. @throws InputError for a name there is no kernel of, with the nearest one. */
export function kernelNamed(name: string, asked: string): Kernel {
  const found = kernels[name as KernelName];
  if (Object.hasOwn(kernels, name) && found) return found;
  throw new InputError(`${asked}: there is no kernel "${name}".${suggestion(name, Object.keys(kernels))}`);
}

/** The largest lag that carries weight at this bandwidth, among the `span − 1` there are. */
export function lastLag(k: Kernel, bandwidth: number, span: number): number {
  if (!k.finite) return bandwidth > 0 ? span - 1 : 0;
  const last = k.name === "truncated" ? Math.floor(bandwidth) : Math.ceil(bandwidth) - 1;
  return Math.max(0, Math.min(span - 1, last));
}

/** Weights of lags 0 to `last`: κ(j / bandwidth), with κ(0) = 1 at any bandwidth, zero included. */
export function lagWeights(k: Kernel, bandwidth: number, last: number): Float64Array {
  const weights = new Float64Array(last + 1);
  weights[0] = 1;
  if (bandwidth > 0) for (let j = 1; j <= last; j++) weights[j] = k.weight(j / bandwidth);
  return weights;
}
