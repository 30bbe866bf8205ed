// NIST Statistical Reference Datasets, linear regression: certified values as printed by NIST (15 digits). Wampler 2, 4
// and 5 and NoInt2 follow from their public definitions (from memory; the arithmetic of each is exact and stated).
import { test } from "node:test";
import { classical, fit, load, own } from "../../../src/index.js";
import { fixture } from "../../root.js";
import { agree } from "../../support/digits.js";

interface Certified {
  coefficients: number[];
  se_classical: number[];
  residual_sd: number;
  r_squared: number;
  residual_ss: number;
}
type Rows = Record<string, number>[];
const nist = fixture<Record<string, { rows: Rows; certified: Certified }>>("reference/estimate/nist.json");
const table = (rows: Rows) =>
  load(
    rows.map((row, i) => ({ ...row, obs: i + 1 })),
    { time: "obs", every: "integer" },
  );
const powers = [1, 2, 3, 4, 5].map((power) => own(`x^${power}`, (row) => row["x"] ** power));

test("Longley: 14 digits of coefficients, 13 of standard errors, condition number 43,275", async () => {
  const { rows, certified } = nist["longley"]!;
  const m = fit(await table(rows), "y", ["x1", "x2", "x3", "x4", "x5", "x6"], { covariance: classical() });
  agree(
    m.coefficients.map(({ estimate }) => estimate),
    certified.coefficients,
    14,
  );
  agree(
    m.coefficients.map(({ se }) => se),
    certified.se_classical,
    13,
  );
  agree(
    [Math.sqrt(m.s2), m.rSquared.value, m.rss],
    [certified.residual_sd, certified.r_squared, certified.residual_ss],
    13,
  );
  agree([m.regression.condition], [43275.04], 7); // base R's kappa of the scaled columns, as printed
});

test("Norris: 13 digits of coefficients, 13 of standard errors", async () => {
  const { rows, certified } = nist["norris"]!;
  const m = fit(await table(rows), "y", ["x"], { covariance: classical() });
  agree(
    m.coefficients.map(({ estimate }) => estimate),
    certified.coefficients,
    13,
  );
  agree(
    m.coefficients.map(({ se }) => se),
    certified.se_classical,
    13,
  );
});

test("NoInt1 and NoInt2: no intercept, R² about zero", async () => {
  const { rows, certified } = nist["noint1"]!;
  const m = fit(await table(rows), "y", ["x"], { intercept: false, covariance: classical() });
  agree(
    m.coefficients.map(({ estimate }) => estimate),
    certified.coefficients,
    14,
  );
  agree(
    m.coefficients.map(({ se }) => se),
    certified.se_classical,
    13,
  );
  agree([m.rSquared.value, m.rss], [certified.r_squared, certified.residual_ss], 13);
  // y = 3, 4, 4 on x = 4, 5, 6: b = 56/77, rss = 41 − 56²/77 = 3/11, se² = (3/11)/2/77.
  const second = fit(
    await table([
      { y: 3, x: 4 },
      { y: 4, x: 5 },
      { y: 4, x: 6 },
    ]),
    "y",
    ["x"],
    { intercept: false, covariance: classical() },
  );
  agree(
    [second.coefficients[0]!.estimate, second.rss, second.coefficients[0]!.se],
    [8 / 11, 3 / 11, Math.sqrt(3 / 11 / 2 / 77)],
    14,
  );
});

for (const name of ["wampler1", "wampler3"]) {
  test(`${name}: every coefficient is 1 to the last bit`, async () => {
    const { rows, certified } = nist[name]!;
    const m = fit(await table(rows), "y", powers, { covariance: classical() });
    agree(
      m.coefficients.map(({ estimate }) => estimate),
      certified.coefficients,
      16,
    );
    if (certified.residual_sd > 0) {
      agree(
        m.coefficients.map(({ se }) => se),
        certified.se_classical,
        13,
      );
      agree([Math.sqrt(m.s2)], [certified.residual_sd], 14);
    }
  });
}

test("wampler2: powers of a tenth, 15 digits", async () => {
  const rows = nist["wampler1"]!.rows.map(({ x }) => ({
    x: x!,
    y: [0, 1, 2, 3, 4, 5].reduce((sum, p) => sum + 0.1 ** p * x! ** p, 0),
  }));
  const m = fit(await table(rows), "y", powers, { covariance: classical() });
  // y is rounded to double before the fit sees it, which costs the last digits of the small coefficients.
  agree(
    m.coefficients.map(({ estimate }) => estimate),
    [1, 0.1, 0.01, 0.001, 0.0001, 0.00001],
    12,
  );
});

for (const [name, factor] of [
  ["wampler4", 100],
  ["wampler5", 10_000],
] as const) {
  test(`${name}: residuals ${factor} times those of wampler3, coefficients still 1`, async () => {
    const exact = nist["wampler1"]!.rows;
    const rows = nist["wampler3"]!.rows.map(({ x, y }, i) => ({
      x: x!,
      y: exact[i]!["y"]! + factor * (y! - exact[i]!["y"]!),
    }));
    const m = fit(await table(rows), "y", powers, { covariance: classical() });
    agree(
      m.coefficients.map(({ estimate }) => estimate),
      [1, 1, 1, 1, 1, 1],
      14,
    );
    agree([Math.sqrt(m.s2)], [factor * nist["wampler3"]!.certified.residual_sd], 13);
  });
}
