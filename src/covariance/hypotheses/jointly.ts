import type { Remark } from "../../data/index.js";
import type { JointLaw } from "../../estimate/index.js";
import { InputError, matrix } from "../../numeric/index.js";
import { quadratic } from "../laws/schur.js";
import { caution, listed } from "../remarks.js";
import { congruence } from "../shape/sandwich.js";
import { dot } from "../shape/vectors.js";
import { aboutFit, type Fitted, requireFit } from "../subject.js";
import { percent, pValue } from "../words.js";
import { JointTest } from "./joint-test.js";
import {
  type ReadRestriction,
  type Restriction,
  readRestriction,
  restrictionMatrix,
} from "./restrictions.js";

/**
 * Whether several restrictions hold at once, by the Wald statistic under the covariance estimator that is on and its joint
 * law. `jointly(m, ["fare", "rain"])` asks whether both are zero; a restriction may also be a combination,
 * `{ fare: 1, rain: -1 }`, or set one equal to a number, `{ weights: { fare: 1 }, equals: -2 }`.
 *
 * @throws InputError for unknown terms, restrictions that follow from one another, and more than the estimator can bear.
 */
export function jointly(m: Fitted, restrictions: Restriction | readonly Restriction[]): JointTest {
  requireFit(m, "jointly");
  const list = Array.isArray(restrictions)
    ? (restrictions as readonly Restriction[])
    : [restrictions as Restriction];
  if (list.length === 0)
    throw new InputError('jointly: no restriction given. Name the terms, such as ["fare", "rain"].');
  const { terms, coefficients, k, T } = m.regression;
  if (list.length > T - k) {
    throw new InputError(
      `jointly: ${list.length} restrictions are more than the ${T - k} degrees of freedom that ${T} periods and ${k} coefficients leave.`,
    );
  }
  const read = list.map((restriction) => readRestriction(restriction, terms, "jointly"));
  const R = restrictionMatrix(read, k, "jointly");
  const { covariance } = m;
  const law = covariance.joint(R);
  const wald = waldStatistic(read, coefficients, congruence(R, covariance.matrix).data);
  const q = read.length;
  const p = law.upper(wald);
  return new JointTest({
    about: aboutFit(m),
    outcome: m.outcome,
    level: m.level,
    restrictions: read.map(({ text }) => text),
    wald,
    statistic: wald / q,
    q,
    law: law.name,
    df: law.df,
    p,
    error: errorOf(law, wald),
    estimator: covariance.label,
    finding: finding(list, read, p, m.level),
    remarks: [...covariance.remarks, ...jointRemarks(q, covariance.details)],
  });
}

/** d'(RVR')⁻¹d, RVR' scaled to unit diagonal first. */
function waldStatistic(
  read: readonly ReadRestriction[],
  coefficients: Float64Array,
  V: Float64Array,
): number {
  const q = read.length;
  const gap = new Float64Array(q);
  const scaled = matrix(q, q);
  read.forEach(({ contrast, equals, text }, i) => {
    const value = dot(contrast, coefficients) - equals;
    const variance = V[i * q + i]!;
    if (!(variance > 0)) {
      throw new InputError(
        `jointly: the variance of "${text}" came out negative under this estimator. Use one whose kernel cannot do that.`,
      );
    }
    gap[i] = value / Math.sqrt(variance);
  });
  for (let j = 0; j < q; j++) {
    for (let i = 0; i < q; i++) {
      scaled.data[j * q + i] = V[j * q + i]! / Math.sqrt(V[i * q + i]! * V[j * q + j]!);
    }
  }
  const wald = quadratic(scaled.data, gap, q);
  if (!Number.isFinite(wald)) {
    throw new InputError(
      "jointly: the covariance of the restrictions is singular under this estimator, so they cannot be tested together. " +
        "Test fewer, or use an estimator of higher rank.",
    );
  }
  return wald;
}

function errorOf(law: JointLaw, wald: number): number | undefined {
  if (law.error === undefined) return undefined;
  return "standardError" in law
    ? (law as { standardError(w: number): number }).standardError(wald)
    : law.error;
}

function finding(
  list: readonly Restriction[],
  read: readonly ReadRestriction[],
  p: number,
  level: number,
): string {
  const plain = list.every((restriction) => typeof restriction === "string");
  const rejected = p < 1 - level;
  if (plain) {
    const names = listed(list as readonly string[]);
    return rejected
      ? `${list.length > 1 ? "Together " : ""}${names} ${list.length > 1 ? "differ" : "differs"} from zero at ${percent(level)} (${pValue(p)}).`
      : `${list.length > 1 ? "Together " : ""}${names} cannot be told from zero at ${percent(level)} (${pValue(p)}).`;
  }
  const what = listed(read.map(({ text }) => text));
  return `${what}: ${rejected ? "rejected" : "not rejected"} at ${percent(level)} (${pValue(p)}).`;
}

function jointRemarks(q: number, details: Readonly<Record<string, unknown>>): Remark[] {
  const b = details["b"];
  if (typeof b !== "number" || !(q * b > 0.3) || details["law"] === "t" || details["law"] === "normal")
    return [];
  return [
    caution(
      `${q} restrictions at b = ${b.toFixed(2)}: the joint law has a very long tail, so that the test can hardly reject. cosine() bears joint tests better.`,
    ),
  ];
}
