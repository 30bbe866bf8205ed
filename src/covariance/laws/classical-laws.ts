import type { JointLaw, ReferenceLaw } from "../../estimate/index.js";
import { chiSquared, fisher, normal, studentT } from "../../numeric/index.js";
import { lawOf } from "./form-law.js";

const students = new Map<number, ReferenceLaw>();

/** Student's t with ν degrees of freedom. */
export function studentLaw(df: number): ReferenceLaw {
  let law = students.get(df);
  if (!law) {
    const { twoSided, critical } = lawOf(
      `t(${df})`,
      (t) => 2 * studentT.upper(t, df),
      (alpha) => studentT.upperQuantile(alpha / 2, df),
    );
    law = { name: `t(${df})`, df, twoSided, critical };
    if (students.size > 1000) students.clear();
    students.set(df, law);
  }
  return law;
}

/** The standard normal. */
export function normalLaw(): ReferenceLaw {
  return {
    name: "normal",
    twoSided: (t) => (Number.isNaN(t) ? Number.NaN : 2 * normal.upper(Math.abs(t))),
    critical: (level) => normal.upperQuantile((1 - level) / 2),
  };
}

/** W times `factor` is F(q, ν): the Wald statistic of q restrictions; `factor` is 1/q unless said. */
export function fisherLaw(q: number, df: number, factor = 1 / q): JointLaw {
  return {
    name: `F(${q}, ${df})`,
    df: [q, df],
    upper: (wald) => (Number.isNaN(wald) ? Number.NaN : fisher.upper(Math.max(0, wald) * factor, q, df)),
  };
}

/** χ² with q degrees of freedom. */
export function chiSquaredLaw(q: number): JointLaw {
  return {
    name: `χ²(${q})`,
    df: [q],
    upper: (wald) => (Number.isNaN(wald) ? Number.NaN : chiSquared.upper(Math.max(0, wald), q)),
  };
}
