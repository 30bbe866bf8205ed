// A hundred thousand rows, against extended precision by another program (make_durbin_watson_long.py).
import { test } from "node:test";
import { durbinWatsonTails, fromColumns, orthonormalBasis } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree } from "../../support/digits.js";

test("the Durbin–Watson law at T = 100,000: 12 digits from p = 0.06 down to p = 1e-21, on either side", () => {
  const { T, rows } = fixture<{ T: number; rows: { d: number; side: "lower" | "upper"; p: number }[] }>(
    "reference/numeric/durbin_watson_long.json",
  );
  const column = (value: (t: number) => number) => Float64Array.from({ length: T }, (_, t) => value(t));
  const Q = orthonormalBasis(
    fromColumns([
      column(() => 1),
      column((t) => t / T),
      column((t) => Math.sin(t * 0.001)),
      column((t) => ((t * 37) % 101) / 101),
    ]),
  );
  for (const { d, side, p } of rows) agree([durbinWatsonTails(d, Q)[side]], [p], 12, `d = ${d}`);
});
