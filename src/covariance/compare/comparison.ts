import type { Remark } from "../../data/index.js";
import type { Covariance, CovarianceEstimator, Regression } from "../../estimate/index.js";
import { InputError } from "../../numeric/index.js";

/** One estimator of a comparison. */
export interface ComparedEstimator {
  /** Short name, as in `hac` and its kin: `Newey–West`. */
  readonly name: string;
  /** With its choices spelled out; the short name where it refused. */
  readonly label: string;
  readonly kind: string;
  readonly options: Readonly<Record<string, unknown>>;
  readonly details: Covariance["details"];
  readonly remarks: readonly Remark[];
  /** Why it gives no covariance on this fit. */
  readonly refused?: string;
}

/** What one estimator says of one coefficient. NaN where it gives no interval. */
export interface ComparedInterval {
  /** Place of the estimator in the comparison. */
  readonly estimator: number;
  readonly se: number;
  readonly low: number;
  readonly high: number;
  readonly p: number;
  /** Standard error as a multiple of the classical one. */
  readonly ratio: number;
  /** Interval's width as a multiple of the classical one's. */
  readonly widthRatio: number;
  /** The law it is judged by. */
  readonly law: string;
  /** On which side of zero the interval lies; `unclear` when it holds zero, `none` when there is no interval. */
  readonly conclusion: "above" | "below" | "unclear" | "none";
}

/** One coefficient under every estimator. */
export interface ComparedCoefficient {
  readonly term: string;
  readonly estimate: number;
  readonly classicalSe: number;
  readonly intervals: readonly ComparedInterval[];
  /** Under how many of the estimators that give an interval it differs from zero. */
  readonly apart: number;
  readonly judged: number;
  /** Whether it differs from zero under all estimators, some or none. */
  readonly holds: "all" | "some" | "none";
  /** Widest interval over narrowest. */
  readonly sensitivity: number;
}

/** Puts every estimator on the regression; one that refuses is kept with its reason. */
export function putOn(
  regression: Regression,
  estimators: readonly CovarianceEstimator[],
): { compared: ComparedEstimator[]; covariances: (Covariance | undefined)[] } {
  const covariances: (Covariance | undefined)[] = [];
  const compared = estimators.map((estimator): ComparedEstimator => {
    const { kind, label: name, options } = estimator;
    try {
      const covariance = estimator.on(regression);
      covariances.push(covariance);
      const { label, details, remarks } = covariance;
      return { name, label, kind, options, details, remarks };
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      covariances.push(undefined);
      return { name, label: name, kind, options, details: {}, remarks: [], refused: error.message };
    }
  });
  return { compared, covariances };
}

/** One coefficient under every covariance. */
export function compareCoefficient(
  regression: Regression,
  a: number,
  covariances: readonly (Covariance | undefined)[],
  level: number,
  reference: Covariance,
): ComparedCoefficient {
  const { k, coefficients, terms } = regression;
  const estimate = coefficients[a]!;
  const contrast = new Float64Array(k);
  contrast[a] = 1;
  const classicalSe = Math.sqrt(reference.matrix.data[a * k + a]!);
  const classicalReach = reference.reference(contrast).critical(level) * classicalSe;
  const intervals = covariances.map((covariance, i): ComparedInterval => {
    const variance = covariance ? covariance.matrix.data[a * k + a]! : Number.NaN;
    if (!covariance || !(variance > 0)) return nothing(i);
    const se = Math.sqrt(variance);
    const law = covariance.reference(contrast);
    const reach = law.critical(level) * se;
    const low = estimate - reach;
    const high = estimate + reach;
    return {
      estimator: i,
      se,
      low,
      high,
      p: law.twoSided(estimate / se),
      ratio: se / classicalSe,
      widthRatio: reach / classicalReach,
      law: law.name,
      conclusion: low > 0 ? "above" : high < 0 ? "below" : "unclear",
    };
  });
  return { term: terms[a]!, estimate, classicalSe, intervals, ...summary(intervals) };
}

function nothing(estimator: number): ComparedInterval {
  const none = Number.NaN;
  return {
    estimator,
    se: none,
    low: none,
    high: none,
    p: none,
    ratio: none,
    widthRatio: none,
    law: "",
    conclusion: "none",
  };
}

function summary(
  intervals: readonly ComparedInterval[],
): Pick<ComparedCoefficient, "apart" | "judged" | "holds" | "sensitivity"> {
  const judged = intervals.filter(({ conclusion }) => conclusion !== "none");
  const apart = judged.filter(({ conclusion }) => conclusion !== "unclear").length;
  const widths = judged.map(({ widthRatio }) => widthRatio);
  return {
    apart,
    judged: judged.length,
    holds: apart === 0 ? "none" : apart === judged.length ? "all" : "some",
    sensitivity: widths.length > 0 ? Math.max(...widths) / Math.min(...widths) : Number.NaN,
  };
}
