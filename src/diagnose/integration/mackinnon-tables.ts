import type { Deterministic } from "./deterministic.js";

/*
 * MacKinnon's response surfaces and p-value polynomials for Dickey–Fuller and Engle–Granger t ratios.
 *
 * Sources: MacKinnon (2010), Queen's Economics Department Working Paper 1227, tables 1 and 2; MacKinnon (1994), Journal of
 * Business & Economic Statistics 12, tables 3 and 4.
 * Standing: written down from memory, then confirmed by simulation: critical values for one series at T = 50 to 2,000 within
 * 0.014 (5 %) and 0.026 (1 %), for two to six series at T = 60 and 400 within 0.012 (5 %) and 0.023 (1 %); p-values within 0.004
 * (one series) and 0.007 (two to six).
 */

/** Whether these figures come from the printed tables or from memory confirmed by simulation. */
export const standing = "from memory, confirmed by simulation";

/** b₀ + b₁/n + b₂/n² + b₃/n³ at 1, 5 and 10 %. */
export interface Surface {
  readonly 1: readonly number[];
  readonly 5: readonly number[];
  readonly 10: readonly number[];
}

/** p = Φ(Σ cᵢτⁱ): `small` up to τ = `star`, `large` above. */
export interface Polynomials {
  readonly small: readonly number[];
  readonly large: readonly number[];
  readonly star: number;
}

type BySeries<T> = Readonly<Record<number, T>>;

/** By deterministic terms and number of integrated series (1: Dickey–Fuller). */
export const surfaces: Readonly<Record<Deterministic, BySeries<Surface>>> = {
  none: {
    1: {
      1: [-2.56574, -2.2358, -3.627, 0],
      5: [-1.941, -0.2686, -3.365, 31.223],
      10: [-1.61682, 0.2656, -2.714, 25.364],
    },
  },
  constant: {
    1: {
      1: [-3.43035, -6.5393, -16.786, -79.433],
      5: [-2.86154, -2.8903, -4.234, -40.04],
      10: [-2.56677, -1.5384, -2.809, 0],
    },
    2: {
      1: [-3.89644, -10.9519, -22.527, 0],
      5: [-3.33613, -6.1101, -6.823, 0],
      10: [-3.04445, -4.2412, -2.72, 0],
    },
    3: {
      1: [-4.29374, -14.4354, -33.195, 47.433],
      5: [-3.74066, -8.5632, -10.852, 27.982],
      10: [-3.45218, -6.2143, -3.718, 0],
    },
    4: {
      1: [-4.64332, -18.1031, -37.972, 0],
      5: [-4.096, -11.2349, -11.175, 0],
      10: [-3.8102, -8.3931, -4.137, 0],
    },
    5: {
      1: [-4.95756, -21.8883, -45.142, 0],
      5: [-4.41519, -14.0405, -12.575, 0],
      10: [-4.13157, -10.7417, -3.784, 0],
    },
    6: {
      1: [-5.24568, -25.6688, -57.737, 88.639],
      5: [-4.70693, -16.9178, -17.492, 60.007],
      10: [-4.42501, -13.1875, -5.104, 27.877],
    },
  },
  trend: {
    1: {
      1: [-3.95877, -9.0531, -28.428, -134.155],
      5: [-3.41049, -4.3904, -9.036, -45.374],
      10: [-3.12705, -2.5856, -3.925, -22.38],
    },
    2: {
      1: [-4.32762, -15.4387, -35.679, 0],
      5: [-3.78057, -9.5106, -12.074, 0],
      10: [-3.49631, -7.0815, -7.538, 21.892],
    },
    3: {
      1: [-4.66305, -18.7688, -49.793, 104.244],
      5: [-4.1189, -11.8922, -19.031, 77.332],
      10: [-3.83511, -9.0723, -8.504, 35.403],
    },
    4: {
      1: [-4.9694, -22.4694, -52.599, 51.314],
      5: [-4.42871, -14.5876, -18.228, 39.647],
      10: [-4.14633, -11.25, -9.873, 54.109],
    },
    5: {
      1: [-5.25276, -26.2183, -59.631, 50.646],
      5: [-4.71537, -17.3569, -22.66, 91.359],
      10: [-4.43422, -13.6078, -10.238, 76.781],
    },
    6: {
      1: [-5.51727, -29.976, -75.222, 202.253],
      5: [-4.98228, -20.305, -25.224, 132.03],
      10: [-4.70233, -16.1253, -9.836, 94.272],
    },
  },
};

/** By deterministic terms and number of integrated series. Asymptotic. */
export const polynomials: Readonly<Record<Deterministic, BySeries<Polynomials>>> = {
  none: {
    1: { small: [0.6344, 1.2378, 0.032496], large: [0.4797, 0.93557, -0.06999, 0.033066], star: -1.04 },
  },
  constant: {
    1: { small: [2.1659, 1.4412, 0.038269], large: [1.7339, 0.93202, -0.12745, -0.010368], star: -1.61 },
    2: { small: [2.92, 1.5012, 0.039796], large: [2.1945, 0.64695, -0.29198, -0.042377], star: -2.62 },
    3: { small: [3.4699, 1.4856, 0.03164], large: [2.5893, 0.45168, -0.36529, -0.050074], star: -3.13 },
    4: { small: [3.9673, 1.4777, 0.026315], large: [3.0387, 0.45452, -0.33666, -0.041921], star: -3.47 },
    5: { small: [4.5509, 1.5338, 0.029545], large: [3.5049, 0.52098, -0.29158, -0.033468], star: -3.78 },
    6: { small: [5.1399, 1.6036, 0.034445], large: [3.9489, 0.58933, -0.25359, -0.02721], star: -3.93 },
  },
  trend: {
    1: { small: [3.2512, 1.6047, 0.049588], large: [2.5261, 0.61654, -0.37956, -0.060285], star: -2.89 },
    2: { small: [3.6646, 1.5419, 0.036448], large: [2.85, 0.5272, -0.36622, -0.051695], star: -3.19 },
    3: { small: [4.0983, 1.5173, 0.029898], large: [3.221, 0.5255, -0.32685, -0.041501], star: -3.5 },
    4: { small: [4.5844, 1.5338, 0.028796], large: [3.652, 0.59758, -0.27483, -0.032081], star: -3.65 },
    5: { small: [5.0722, 1.5634, 0.029472], large: [4.0712, 0.66428, -0.23464, -0.02546], star: -3.8 },
    6: { small: [5.53, 1.5914, 0.030392], large: [4.4735, 0.71757, -0.20681, -0.021196], star: -4.36 },
  },
};
