import type { Remark } from "../../data/index.js";
import type { CovarianceEstimator, Regression } from "../../estimate/index.js";
import { InputError } from "../../numeric/index.js";
import { kernels } from "../kernels.js";
import { dependentLaw } from "../laws/dependent-law.js";
import { type ErrorProcess, requireStationary } from "../laws/error-process.js";
import { ownDesignLaw } from "../laws/fixed-b.js";
import { dependentJointLaw } from "../laws/joint-dependent.js";
import { caution, note, requireErrors } from "../remarks.js";
import { fitAr1 } from "../rules/ar1-reml.js";
import { scoresOf } from "../scores.js";
import { hacCovariance } from "./hac-covariance.js";

/** Coefficients of a known error process: u_t = Σ ar_i u_{t−i} + ε_t + Σ ma_j ε_{t−j}. */
export interface KnownErrors {
  readonly ar?: readonly number[];
  readonly ma?: readonly number[];
}

export interface CalibratedOptions {
  /** `ar(1)`, fitted to the residuals by restricted maximum likelihood, unless said; or the coefficients of a known process. */
  readonly errors?: "ar(1)" | KnownErrors;
  /** Lags of the Newey–West standard error; ⌈1.3 √T⌉ − 1 unless said. */
  readonly lags?: number;
}

/** Beyond this a step of the calculation takes seconds. */
const LONGEST = 200_000;

/**
 * Newey–West standard errors with the critical value that gives exact coverage on this X if the errors follow a stated process: the c that
 * solves P(|β̂ − β| > c·se) = 1 − level for normal errors with that correlation matrix. Its premise is the
 * process, not only its coefficients; show it beside the others.
 *
 * @throws InputError for a process that is not stationary or lags that are no whole number.
 */
export function calibrated(options: CalibratedOptions = {}): CovarianceEstimator {
  const { errors = "ar(1)", lags } = options;
  if (lags !== undefined && !(Number.isInteger(lags) && lags >= 0)) {
    throw new InputError(`calibrated: lags must be a whole number from 0 on, not ${lags}.`);
  }
  const given = errors === "ar(1)" ? undefined : knownProcess(errors);
  return {
    kind: "calibrated",
    label: `Newey–West, calibrated to ${given ? given.label : "AR(1) errors"}`,
    options: { errors, ...(lags === undefined ? {} : { lags }) },
    on(regression) {
      requireErrors(regression, "calibrated");
      const scores = scoresOf(regression);
      if (scores.span > LONGEST) {
        throw new InputError(
          `calibrated: the law of the t ratio is computed period by period, and ${scores.span} periods are too many for that ` +
            `(at most ${LONGEST}). With so many the fixed-b law of neweyWest() says much the same.`,
        );
      }
      const base = hacCovariance(regression, {
        kernel: kernels.bartlett,
        bandwidth: lags === undefined ? "square-root" : lags + 1,
        prewhiten: false,
        factor: true,
        law: "fixed-b",
        asked: "calibrated",
        title: "Newey–West",
      });
      const { process, remarks } = given ? { process: given, remarks: [] } : fittedProcess(regression);
      const choice = {
        kernel: kernels.bartlett,
        bandwidth: base.details["bandwidth"] as number,
        factor: base.details["factor"] as number,
      };
      const name = `calibrated to ${process.label}`;
      return {
        label: `${base.label}, ${name}`,
        matrix: base.matrix,
        details: {
          ...base.details,
          law: "calibrated",
          errors: process.label,
          ...Object.fromEntries(process.ar.map((phi, i) => [`ar ${i + 1}`, phi])),
          ...Object.fromEntries(process.ma.map((theta, j) => [`ma ${j + 1}`, theta])),
        },
        get remarks() {
          return [
            note(
              `Critical values are exact if the errors are normal and follow ${process.label}; nothing else is allowed for.`,
            ),
            ...remarks,
            ...base.remarks,
          ];
        },
        reference: (contrast) =>
          uncorrelated(process)
            ? ownDesignLaw(scores, contrast, choice, name)
            : dependentLaw(scores, contrast, choice, process),
        joint(restrictions) {
          base.joint(restrictions);
          return dependentJointLaw(scores, restrictions, choice, process);
        },
      };
    },
  };
}

const uncorrelated = ({ ar, ma }: ErrorProcess): boolean => [...ar, ...ma].every((value) => value === 0);

function knownProcess({ ar = [], ma = [] }: KnownErrors): ErrorProcess {
  if (![...ar, ...ma].every(Number.isFinite)) {
    throw new InputError("calibrated: the coefficients of the errors must be numbers.");
  }
  requireStationary(ar);
  const parts = [
    ...(ar.length > 0 ? [`AR(${ar.join(", ")})`] : []),
    ...(ma.length > 0 ? [`MA(${ma.join(", ")})`] : []),
  ];
  return { ar, ma, label: parts.length > 0 ? `${parts.join(" ")} errors` : "uncorrelated errors" };
}

function fittedProcess(regression: Regression): { process: ErrorProcess; remarks: Remark[] } {
  const { rho, atBound, maxima } = fitAr1(scoresOf(regression));
  const remarks: Remark[] = [];
  if (atBound) {
    remarks.push(
      caution(
        `The errors' AR(1) coefficient is at the end of its range, ${rho}: near a unit root no calibration holds.`,
      ),
    );
  }
  if (maxima > 1) {
    remarks.push(
      note(`The restricted likelihood of the AR(1) coefficient has ${maxima} maxima; the highest was taken.`),
    );
  }
  if (regression.laggedOutcome) {
    remarks.push(
      caution(
        "A lag of the outcome is among the terms: the calibration takes the terms as given, which they are not.",
      ),
    );
  }
  const shown = rho.toFixed(3).replace("-", "−");
  return { process: { ar: [rho], ma: [], label: `AR(1) errors, ρ = ${shown}` }, remarks };
}
