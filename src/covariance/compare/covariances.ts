import { type Remark, suggestion } from "../../data/index.js";
import type { CovarianceEstimator } from "../../estimate/index.js";
import { InputError } from "../../numeric/index.js";
import { classical } from "../estimators/classical.js";
import { CALIBRATED_UP_TO, defaultComparison } from "../estimators/default.js";
import { note } from "../remarks.js";
import { aboutFit, type Fitted, requireFit } from "../subject.js";
import { type ComparedCoefficient, type ComparedEstimator, compareCoefficient, putOn } from "./comparison.js";
import { Covariances } from "./covariances-result.js";
import { comparisonFinding } from "./finding.js";

export interface CovariancesOptions {
  /** Labels of the coefficients to show; all unless said. */
  readonly terms?: readonly string[];
  /** `sensitivity` puts those first whose interval's width changes most; `order` keeps the fit's order. `sensitivity` unless said. */
  readonly sort?: "sensitivity" | "order";
  /** Level of the intervals; the fit's unless said. */
  readonly level?: number;
}

/**
 * Every coefficient of a fit under every estimator: estimate, standard error, interval, p and its law, the ratio to the
 * classical standard error, and which conclusions change.
 *
 * @param estimators the twelve of `defaultComparison` unless said. One that refuses this fit stays in the list with its reason.
 * @throws InputError for an unknown term, and for a fit without errors.
 */
export function covariances(
  m: Fitted,
  estimators?: readonly CovarianceEstimator[] | CovariancesOptions,
  options: CovariancesOptions = {},
): Covariances {
  if (estimators !== undefined && !Array.isArray(estimators)) {
    return covariances(m, undefined, estimators as CovariancesOptions);
  }
  requireFit(m, "covariances");
  const { regression, outcome, span } = m;
  const { T, k, terms, interceptAt } = regression;
  const asked = estimators as readonly CovarianceEstimator[] | undefined;
  requireEstimators(asked);
  const chosen = asked ?? defaultComparison(T);
  const level = options.level ?? m.level;
  if (!(level > 0 && level < 1)) {
    throw new InputError(`covariances: the level must lie between 0 and 1, not ${level}.`);
  }
  const places = chosenTerms(terms, options.terms);
  const { compared, covariances: made } = putOn(regression, chosen);
  const reference = classical().on(regression);
  const coefficients = places.map((a) => compareCoefficient(regression, a, made, level, reference));
  if (options.sort !== "order") {
    const key = (row: ComparedCoefficient): number => (Number.isNaN(row.sensitivity) ? -1 : row.sensitivity);
    coefficients.sort((a, b) => key(b) - key(a));
  }
  return new Covariances({
    about: aboutFit(m),
    outcome,
    span,
    T,
    k,
    level,
    estimators: compared,
    coefficients,
    finding: comparisonFinding(coefficients, compared, level, terms[interceptAt]),
    remarks: [...gathered(compared), ...leftOut(asked, T)],
  });
}

function requireEstimators(estimators: readonly CovarianceEstimator[] | undefined): void {
  if (estimators === undefined) return;
  if (estimators.length === 0)
    throw new InputError("covariances: the list of estimators is empty. Leave it out for the usual twelve.");
  estimators.forEach((estimator, i) => {
    if (typeof estimator?.on !== "function") {
      throw new InputError(
        `covariances: entry ${i + 1} of the list is no covariance estimator, such as neweyWest() returns.`,
      );
    }
  });
}

function chosenTerms(terms: readonly string[], wanted: readonly string[] | undefined): number[] {
  if (!wanted) return terms.map((_, a) => a);
  return wanted.map((term) => {
    const at = terms.indexOf(term);
    if (at < 0)
      throw new InputError(
        `covariances: the fit has no term ${JSON.stringify(term)}.${suggestion(term, terms)}`,
      );
    return at;
  });
}

/** Each remark once, with the estimators it is about unless it is about all. */
function gathered(estimators: readonly ComparedEstimator[]): Remark[] {
  const about = new Map<string, { remark: Remark; names: string[] }>();
  for (const { label, remarks } of estimators) {
    for (const remark of remarks) {
      const held = about.get(remark.text);
      if (held) held.names.push(label);
      else about.set(remark.text, { remark, names: [label] });
    }
  }
  const result = [...about.values()].map(({ remark, names }): Remark => {
    if (names.length > 3) return remark;
    return { severity: remark.severity, text: `${names.join("; ")}: ${remark.text}` };
  });
  for (const { label, refused } of estimators) {
    if (refused !== undefined)
      result.push({ severity: "caution", text: `${label} gives nothing here. ${refused}` });
  }
  return result.sort((a, b) => Number(a.severity === "note") - Number(b.severity === "note"));
}

function leftOut(asked: readonly CovarianceEstimator[] | undefined, T: number): Remark[] {
  if (asked || T <= CALIBRATED_UP_TO) return [];
  return [note(`Above ${CALIBRATED_UP_TO} periods the calibrated law is left out unless asked for.`)];
}
