import { chiSquared, fisher, normal, studentT } from "../../numeric/index.js";
import type { Test, TestDetails } from "../test.js";

/** A test whose statistic is χ²(df) under the hypothesis; large values speak against it. */
export function chiSquaredTest(name: string, statistic: number, df: number, details: TestDetails = {}): Test {
  const p = chiSquared.upper(Math.max(statistic, 0), df);
  return { name, statistic, df: [df], distribution: `χ²(${df})`, p, valid: true, ...details };
}

/** A test whose statistic is F(df1, df2) under the hypothesis. */
export function fisherTest(
  name: string,
  statistic: number,
  df1: number,
  df2: number,
  details: TestDetails = {},
): Test {
  const p = fisher.upper(Math.max(statistic, 0), df1, df2);
  return { name, statistic, df: [df1, df2], distribution: `F(${df1}, ${df2})`, p, valid: true, ...details };
}

/** A two-sided test of a t ratio. */
export function studentTest(name: string, statistic: number, df: number, details: TestDetails = {}): Test {
  const p = 2 * studentT.upper(Math.abs(statistic), df);
  return { name, statistic, df: [df], distribution: `t(${df})`, p, valid: true, ...details };
}

/** A two-sided test of a standard normal ratio. */
export function normalTest(name: string, statistic: number, details: TestDetails = {}): Test {
  const p = 2 * normal.upper(Math.abs(statistic));
  return { name, statistic, df: [], distribution: "normal", p, valid: true, ...details };
}

/** A test that these data do not allow, with the reason. */
export function notComputed(name: string, note: string, lags?: number): Test {
  const nothing = {
    name,
    statistic: Number.NaN,
    df: [],
    distribution: "",
    p: Number.NaN,
    valid: false,
    note,
  };
  return lags === undefined ? nothing : { ...nothing, lags };
}
