// Hostile files, each with what a trustworthy tool does with it: expected.json gives the numbers of the fit (made in
// exact arithmetic beside the files) and the signatures of the silent mistakes.
import assert from "node:assert/strict";
import { test } from "node:test";
import { classical, dependence, type Fit, fit, lag, load, type TimeTable } from "../../../src/index.js";
import { fixture, fixturePath } from "../../root.js";
import { agree } from "../../support/digits.js";

interface Numbers {
  nobs: number;
  coefficients: number[];
  se_classical: number[];
  rss: number;
  dw_row_order: number;
}
const expected = Object.fromEntries(
  fixture<{ id: string; numbers: Record<string, Numbers> }[]>("reference/data/nasty/expected.json").map(
    ({ id, numbers }) => [id, numbers],
  ),
);
const open = (id: string, options: object = {}): Promise<TimeTable> =>
  load(fixturePath(`reference/data/nasty/${id}.csv`), { time: "time", ...options });
const options = { covariance: classical() } as const;

function same(m: Fit, numbers: Numbers, digits = 12): void {
  assert.equal(m.T, numbers.nobs);
  agree(
    m.coefficients.slice(0, numbers.coefficients.length).map(({ estimate }) => estimate),
    numbers.coefficients,
    digits,
  );
  if (numbers.se_classical)
    agree(
      m.coefficients.slice(0, numbers.se_classical.length).map(({ se }) => se),
      numbers.se_classical,
      digits - 1,
    );
}
const plain = (table: TimeTable) => fit(table, "y", ["x1", "x2"], options);
const lagged = (table: TimeTable, extra: object = {}) =>
  fit(table, "y", ["x1", lag("y")], { ...options, ...extra });
const refused = async (work: () => unknown, ...patterns: RegExp[]) => {
  await assert.rejects(
    async () => work(),
    (error: Error) => {
      assert.equal(error.name, "InputError", error.stack);
      for (const pattern of patterns) assert.match(error.message, pattern);
      return true;
    },
  );
};
const tells = (table: TimeTable, pattern: RegExp) =>
  assert.ok(
    table.findings.some(({ text }) => pattern.test(text)),
    JSON.stringify(table.findings),
  );

test("00 clean", async () => {
  const table = await open("00_clean");
  assert.deepEqual(table.findings, []);
  const m = plain(table);
  same(m, expected["00_clean"]!["clean"]!);
  same(lagged(table), expected["00_clean"]!["lag_by_time"]!);
  const dw = dependence(m).tests.find(({ name }) => name === "Durbin–Watson")!;
  agree([dw.statistic], [expected["00_clean"]!["clean"]!.dw_row_order], 12);
});

test("01 a gap is found, and a lag never reaches across it", async () => {
  const table = await open("01_time_gap");
  tells(table, /1 month is absent in 1 gap, first 2019-07/);
  same(plain(table), expected["01_time_gap"]!["static_ols"]!);
  await refused(() => lagged(table), /"y \(t−1\)" is missing in 1 of 23 periods \(2019-08/);
  same(lagged(table, { missing: "leave out" }), expected["01_time_gap"]!["lag_by_time"]!);
});

test("02 doubled periods are named and refused until told what to do", async () => {
  const table = await open("02_duplicate_timestamp");
  tells(table, /rows 8 and 9 both stand for 2019-08/);
  await refused(() => plain(table), /rows 8 and 9/, /dedupe/);
  same(plain(table.dedupe("identical")), expected["02_duplicate_timestamp"]!["if_duplicate_removed"]!);
});

test("03 unsorted rows are refused until sorted", async () => {
  const table = await open("03_unsorted_rows");
  tells(table, /not in order of time/);
  await refused(() => lagged(table), /not in order of time/, /\.sort\(\)/);
  same(plain(table.sort()), expected["03_unsorted_rows"]!["if_sorted"]!);
  same(lagged(table.sort()), expected["03_unsorted_rows"]!["sorted_lag"]!);
});

test("04 mixed date forms: the first row that does not fit is named", () =>
  refused(
    () => open("04_mixed_date_formats"),
    /row 4/,
    /"01\/04\/2019"/,
    /day and month cannot be told apart/,
  ));

test("05 missing values are counted, refused in a fit, and lags made before rows are left out", async () => {
  const table = await open("05_missing_values");
  for (const [name, period] of [
    ["y", "2019-09"],
    ["x1", "2019-05"],
    ["x2", "2020-04"],
  ])
    tells(table, new RegExp(`"${name}" is missing in 1 of 24 rows.*${period}`));
  await refused(
    () => plain(table),
    /"x1" is missing in 1 of 24 periods \(2019-05, row 5\)/,
    /"x2".*row 16/,
    /leave out/,
  );
  same(
    fit(table, "y", ["x1", "x2"], { ...options, missing: "leave out" }),
    expected["05_missing_values"]!["listwise_static"]!,
  );
  same(lagged(table, { missing: "leave out" }), expected["05_missing_values"]!["lag_by_time"]!);
});

test("07, 08, 28, 35 thousands separators, decimal commas, tabs and Latin-1 are read and said", async () => {
  const thousands = await open("07_thousands_separator");
  tells(thousands, /"," between thousands/);
  same(plain(thousands), expected["07_thousands_separator"]!["if_handled"]!);
  const commas = await open("08_decimal_comma_semicolon");
  tells(commas, /semicolons/);
  tells(commas, /decimal comma/);
  same(plain(commas), expected["08_decimal_comma_semicolon"]!["if_handled"]!);
  const tabs = await open("28_tab_separated");
  tells(tabs, /tabs/);
  same(plain(tabs), expected["28_tab_separated"]!["if_handled"]!);
  const latin = await open("35_latin1");
  tells(latin, /Latin-1/);
  same(fit(latin, "y", ["größe", "x2"], options), expected["35_latin1"]!["if_handled"]!);
});

for (const id of ["09_utf8_bom", "10_crlf", "29_blank_lines", "26p_quoted_newline_cell"]) {
  test(`${id} changes nothing`, async () => same(plain(await open(id)), expected[id]!["if_handled"]!));
}

test("11, 12 empty files", async () => {
  await refused(() => open("11_empty_file"), /is empty/);
  await refused(() => open("12_header_only"), /no rows/);
});

test("13, 14, 27 collinear columns are named with what they depend on", async () => {
  const constant = await open("13_constant_column");
  await refused(() => plain(constant), /"x2" is constant \(5\)/, /intercept/);
  same(fit(constant, "y", ["x1"], options), expected["13_constant_column"]!["if_x2_dropped"]!);
  const sum = await open("14_perfect_collinear");
  await refused(() => fit(sum, "y", ["x1", "x2", "x3"]), /"x1"/, /"x2"/, /"x3"/);
  const ones = await open("27_own_intercept_column");
  await refused(() => fit(ones, "y", ["x1", "x2", "(intercept)"]), /"\(intercept\)" is constant \(1\)/);
});

test("15 columns of very different scale", async () => {
  same(plain(await open("15_scaled_columns")), expected["15_scaled_columns"]!["if_handled"]!);
});

test("16 more coefficients than periods", async () => {
  await refused(async () => plain(await open("16_T_less_than_k")), /2 periods for 3 coefficients/);
  await refused(async () => plain(await open("16b_T_equals_k")), /3 periods for 3 coefficients/);
});

test("17 a perfect fit has coefficients and nothing else", async () => {
  const m = plain(await open("17_zero_residuals"));
  for (const [j, wanted] of [1, 2, 0].entries())
    assert.ok(Math.abs(m.coefficients[j]!.estimate - wanted) < 1e-12);
  assert.ok(m.coefficients.every(({ se, p }) => Number.isNaN(se) && Number.isNaN(p)));
  assert.ok(m.remarks.some(({ text }) => /perfect/.test(text)));
});

test("18, 26 an infinite cell and a text among numbers", async () => {
  await refused(() => open("18_inf"), /row 6/, /"x1"/, /infinite/);
  await refused(() => open("26_text_in_numeric"), /row 8/, /line 9/, /"x1"/, /"10\.88a"/);
});

test("23, 24n, 25n, 26n names are kept exactly and never parsed", async () => {
  for (const id of ["23_nonascii_names", "24n_operator_names", "25n_html_injection", "26n_quoted_newline"]) {
    const table = await open(id);
    const [y, a, b] = table.names;
    same(fit(table, y!, [a!, b!], options), expected[id]!["first_three"]!);
  }
});

test("24, 25, 36, 38 ragged rows, doubled names, no header, the outcome among the terms", async () => {
  await refused(() => open("24_ragged_short_row"), /line 8/, /3 fields/);
  await refused(() => open("25_duplicate_names"), /two columns called "x1"/);
  await refused(() => open("36_no_header"), /looks like data/);
  const all = await open("36_no_header", { names: ["time", "y", "x1", "x2"] });
  same(plain(all), expected["36_no_header"]!["if_all_rows_kept"]!);
  await refused(
    async () => fit(await open("38_y_on_both_sides"), "y", ["y", "x1"]),
    /outcome "y" is also among the terms/,
  );
});
