import { readFileSync } from "node:fs";
import type { Regression } from "../../../src/estimate/index.js";
import { fixture, fixturePath } from "../../root.js";
import { regressionOf } from "../../unit/covariance/regression.js";

/** Standard errors and, for some, the whole matrix under one estimator. */
export interface Expected {
  readonly se?: readonly (number | null)[];
  readonly se_no_factor?: readonly (number | null)[];
  readonly se_T_over_T_minus_k?: readonly (number | null)[];
  readonly matrix?: readonly (readonly number[])[];
  readonly matrix_no_factor?: readonly (readonly number[])[];
  readonly bandwidth?: number;
  readonly lag_truncation?: number;
  readonly nu?: number;
}

export interface Case {
  readonly case: string;
  readonly covariance: Readonly<Record<string, Expected>>;
  readonly bandwidth_selection: {
    readonly andrews1991: {
      readonly A: {
        readonly alpha1: number;
        readonly alpha2: number;
        readonly bandwidth: Readonly<Record<string, number>>;
      };
    };
    readonly newey_west_1994: Readonly<
      Record<string, { pre_truncation_lag: number; s0: number; sq: number; gamma: number; bandwidth: number }>
    >;
    readonly prewhitened: { readonly spectral_radius_A: number };
  };
}

export const caseNames = [
  "airmiles_quadratic",
  "lakehuron_trend",
  "longley_full",
  "nile_mean",
  "nile_step",
  "seatbelts_lags",
  "seatbelts_static_seasonal",
  "ukgas_trend_seasonal_lag",
];

export const loadCase = (name: string): Case => fixture<Case>(`reference/covariance/${name}.json`);

/** The case's regression, from its design file. */
export function caseRegression(name: string): Regression {
  const lines = readFileSync(fixturePath(`reference/covariance/${name}.design.csv`), "utf8")
    .trim()
    .split("\n");
  const header = lines[0]!.split(",");
  const rows = lines.slice(1).map((line) => line.split(","));
  const column = (at: number): number[] => rows.map((row) => Number(row[at]));
  const y = header.indexOf("y");
  return regressionOf(
    header.slice(y + 1).map((_, j) => column(y + 1 + j)),
    column(y),
  );
}

/** Largest relative difference of two lists, places where either has no number left out. */
export function worst(got: ArrayLike<number>, wanted: readonly (number | null)[]): number {
  let result = 0;
  wanted.forEach((value, i) => {
    if (value !== null) result = Math.max(result, Math.abs(got[i]! / value - 1));
  });
  return result;
}
