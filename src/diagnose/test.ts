/**
 * One test of one hypothesis. Where a figure cannot be computed `statistic` and `p` are NaN, `valid` is false
 * and `note` says why.
 */
export interface Test {
  readonly name: string;
  /** The lag or the highest of the lags it looks at. */
  readonly lags?: number;
  readonly statistic: number;
  readonly df: readonly number[];
  /** The law under the hypothesis: `F(4, 171)`, `χ²(4)`, `exact, normal errors`. */
  readonly distribution: string;
  readonly p: number;
  /** Whether the law holds for a model of this kind. A test that is not valid here is arithmetic only. */
  readonly valid: boolean;
  readonly note?: string;
}

/** What a test function may say of its test beside the figures. */
export type TestDetails = Partial<Pick<Test, "lags" | "valid" | "note">>;
