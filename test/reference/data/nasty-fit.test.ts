import assert from "node:assert/strict";
import { join } from "node:path";
import { test } from "node:test";
import type { LoadOptions } from "../../../src/data/index.js";
import { classical, type Fit, fit, type InputError, lag, load } from "../../../src/index.js";
import { fixture, fixturePath } from "../../root.js";
import { agree } from "../../support/digits.js";

/**
 * What a regression on each hostile file gives, against 60-digit arithmetic rounded once (expected.json), to 11
 * digits. The keys that end in WRONG, the results of the silent mistakes, must not come out.
 */
interface Numbers {
  readonly nobs: number;
  readonly coefficients: number[];
  readonly rss: number;
  readonly se_classical?: number[];
}
const cases = fixture<{ id: string; numbers: Record<string, Numbers> }[]>(
  "reference/data/nasty/expected.json",
);
const numbersOf = (id: string, key: string): Numbers => cases.find((one) => one.id === id)!.numbers[key]!;
const open = (id: string, options: Partial<LoadOptions> = {}) =>
  load(join(fixturePath("reference/data/nasty"), `${id}.csv`), { time: "time", ...options });

function holds(m: Fit, wanted: Numbers, least = 11): void {
  assert.equal(m.T, wanted.nobs);
  agree(
    m.coefficients.map(({ estimate }) => estimate),
    wanted.coefficients,
    least,
    "coefficient",
  );
  agree([m.rss], [wanted.rss], least, "residual sum of squares");
  if (!wanted.se_classical) return;
  const errors = m.under(classical()).coefficients.map(({ se }) => se);
  agree(errors, wanted.se_classical, least, "standard error");
}

const refuses = (work: () => unknown, pattern: RegExp) =>
  assert.throws(work, (error: InputError) => error.name === "InputError" && pattern.test(error.message));

for (const [id, key, options] of [
  ["00_clean", "clean", {}],
  ["01_time_gap", "static_ols", {}],
  ["02_duplicate_timestamp", "if_duplicate_removed", { dedupe: "identical" }],
  ["03_unsorted_rows", "if_sorted", { sort: true }],
  ["07_thousands_separator", "if_handled", {}],
  ["08_decimal_comma_semicolon", "if_handled", {}],
  ["09_utf8_bom", "if_handled", {}],
  ["10_crlf", "if_handled", {}],
  ["15_scaled_columns", "if_handled", {}],
  ["26p_quoted_newline_cell", "if_handled", {}],
  ["28_tab_separated", "if_handled", {}],
  ["29_blank_lines", "if_handled", {}],
  ["36_no_header", "if_all_rows_kept", { names: ["time", "y", "x1", "x2"] }],
] as const) {
  test(`${id}: y on x1 and x2`, async () => {
    holds(fit(await open(id, options), "y", ["x1", "x2"]), numbersOf(id, key));
  });
}

for (const id of ["23_nonascii_names", "24n_operator_names", "25n_html_injection", "26n_quoted_newline"]) {
  test(`${id}: the first column on the next two, whatever they are called`, async () => {
    const table = await open(id);
    const [y, ...x] = table.names.slice(0, 3) as [string, string, string];
    const m = fit(table, y, x);
    holds(m, numbersOf(id, "first_three"));
    assert.deepEqual(m.terms, ["intercept", ...x]);
  });
}

test("35_latin1: a column whose name is not in UTF-8", async () => {
  holds(fit(await open("35_latin1"), "y", ["größe", "x2"]), numbersOf("35_latin1", "if_handled"));
});

test("lags step in time: across a gap, in sorted rows, before missing rows fall out", async () => {
  const terms = ["x1", lag("y", 1)];
  holds(fit(await open("00_clean"), "y", terms), numbersOf("00_clean", "lag_by_time"));
  const sorted = await open("03_unsorted_rows", { sort: true });
  holds(fit(sorted, "y", terms), numbersOf("03_unsorted_rows", "sorted_lag"));
  const missing = { missing: "leave out" } as const;
  const gap = fit(await open("01_time_gap"), "y", terms, missing);
  holds(gap, numbersOf("01_time_gap", "lag_by_time"));
  assert.notEqual(gap.T, numbersOf("01_time_gap", "lag_by_row_WRONG").nobs);
  holds(
    fit(await open("05_missing_values"), "y", terms, missing),
    numbersOf("05_missing_values", "lag_by_time"),
  );
});

test("05: missing values are refused with their place, or left out when asked", async () => {
  const table = await open("05_missing_values");
  refuses(() => fit(table, "y", ["x1", "x2"]), /missing in .*(2019-05|2019-09|2020-04)/);
  const m = fit(table, "y", ["x1", "x2"], { missing: "leave out" });
  holds(m, numbersOf("05_missing_values", "listwise_static"));
  assert.equal(m.design.left.length, 3);
});

test("13, 14, 27: columns that depend on each other are named", async () => {
  const constant = await open("13_constant_column");
  refuses(() => fit(constant, "y", ["x1", "x2"]), /"?x2"?/);
  holds(fit(constant, "y", ["x1"]), numbersOf("13_constant_column", "if_x2_dropped"));
  const collinear = await open("14_perfect_collinear");
  refuses(() => fit(collinear, "y", ["x1", "x2", "x3"]), /x3/);
  holds(fit(collinear, "y", ["x1", "x2"]), numbersOf("14_perfect_collinear", "if_x3_dropped"));
  const own = await open("27_own_intercept_column");
  refuses(() => fit(own, "y", ["x1", "x2", "(intercept)"]), /\(intercept\)/);
  holds(fit(own, "y", ["x1", "x2"]), numbersOf("27_own_intercept_column", "if_removed"));
});

test("16, 16b: too few rows for the coefficients", async () => {
  const two = await open("16_T_less_than_k");
  refuses(() => fit(two, "y", ["x1", "x2"]), /2 periods for 3 coefficients/);
  const three = await open("16b_T_equals_k");
  refuses(() => fit(three, "y", ["x1", "x2"]), /3 periods for 3 coefficients/);
});

test("17: an exact relation gives its coefficients", async () => {
  const table = await open("17_zero_residuals");
  const m = fit(table, "y", ["x1", "x2"]);
  agree(
    m.coefficients.map(({ estimate }) => estimate),
    [1, 2, 0],
    12,
    "coefficient",
  );
  assert.ok(m.rss < 1e-20);
});

test("38: the outcome is no term of its own", async () => {
  const table = await open("38_y_on_both_sides");
  refuses(() => fit(table, "y", ["y", "x1"]), /outcome "y" is also among the terms/);
});
