import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../../src/data/index.js";
import {
  between,
  columnsOf,
  fourier,
  pulse,
  ramp,
  seasonal,
  step,
  trend,
} from "../../../../src/design/index.js";
import { agree } from "../../../support/digits.js";
import { gappedWeeks, names, only, quarters, values, weeks } from "../tables.js";

test("a trend counts gaps, from 1 in the table's first period", async () => {
  const table = await gappedWeeks();
  assert.deepEqual(values(trend(), table), [1, 2, 3, 6, 7, 8, 9, 10]);
  assert.deepEqual(names(trend(3), table), ["trend", "trend²", "trend³"]);
  assert.deepEqual([...columnsOf(trend(2), table)[1]!.values], [1, 4, 9, 36, 49, 64, 81, 100]);
  assert.equal(only(trend(), table).note, "trend is 1 in 2024-W01");
  assert.throws(() => trend(0), /degree must be a whole number from 1 to 10, not 0/);
});

test("steps, pulses, ramps and spans begin in the period that they name", async () => {
  const table = await weeks();
  const terms = [step("2024-W08"), pulse("2024-W08"), ramp("2024-W08"), between("2024-W02", "2024-W03")];
  assert.deepEqual(names(terms, table), [
    "from 2024-W08",
    "in 2024-W08",
    "since 2024-W08",
    "2024-W02 to 2024-W03",
  ]);
  assert.deepEqual(
    columnsOf(terms, table).map((column) => [...column.values]),
    [
      [0, 0, 0, 0, 0, 0, 0, 1, 1, 1],
      [0, 0, 0, 0, 0, 0, 0, 1, 0, 0],
      [0, 0, 0, 0, 0, 0, 0, 1, 2, 3],
      [0, 1, 1, 0, 0, 0, 0, 0, 0, 0],
    ],
  );
});

test("a period may be written as any date within it; a year of quarters is all four", async () => {
  assert.deepEqual(names(step("2024-02-20"), await weeks()), ["from 2024-W08"]);
  const table = await quarters(12);
  assert.deepEqual(names([step(2021), between(2021, 2021)], table), ["from 2021Q1", "2021Q1 to 2021Q4"]);
});

test("periods that leave no variation, or are none, are refused", async () => {
  const table = await gappedWeeks();
  const refused = (make: () => Parameters<typeof values>[0], pattern: RegExp) =>
    assert.throws(() => values(make(), table), { name: "InputError", message: pattern });
  refused(() => step("2031-W01"), /step: "from 2031-W01" does not vary over the table, which spans 2024-W01/);
  refused(() => step("2024-W01"), /does not vary/);
  refused(() => pulse("2024-W04"), /pulse: "in 2024-W04" does not vary/); // in the gap
  refused(() => between("2020", "2030"), /between: .* does not vary/);
  refused(() => between("2024-W03", "2024-W02"), /between: 2024-W02 comes before 2024-W03/);
  refused(() => step("sometime"), /step: "sometime" cannot be read as a period/);
  refused(() => step(undefined as never), /step: give a period, such as step\("2024-W01"\)/);
});

test("seasons against the first, against their mean, or each on its own", async () => {
  const table = await quarters(8);
  assert.deepEqual(names(seasonal(), table), ["Q2", "Q3", "Q4"]);
  assert.deepEqual(values(seasonal(), table), [0, 1, 0, 0, 0, 1, 0, 0]);
  assert.equal(only(seasonal(), table).note, "seasons are measured against Q1");
  const zero = columnsOf(seasonal({ contrast: "sum-to-zero" }), table);
  assert.deepEqual(
    zero.map(({ values }) => [...values].slice(0, 4)),
    [
      [1, 0, 0, -1],
      [0, 1, 0, -1],
      [0, 0, 1, -1],
    ],
  );
  assert.match(zero[0]!.note!, /against their mean; Q4 is minus the sum of the others/);
  assert.deepEqual(names(seasonal({ contrast: "all" }), table), ["Q1", "Q2", "Q3", "Q4"]);
  assert.throws(() => seasonal("all" as never), /options come in braces/);
  assert.throws(() => seasonal({ contrast: "none" as never }), /contrast "none" is none of/);
});

test("week 53 counts with week 52, and the card says so where there is one", async () => {
  const year = (first: number, labels: string[]) =>
    load(
      labels.map((week, i) => ({ week, x: i + first })),
      { time: "week" },
    );
  const long = await year(0, ["2020-W51", "2020-W52", "2020-W53", "2021-W01"]);
  const last = columnsOf(seasonal(), long).at(-1)!;
  assert.equal(last.label, "W52");
  assert.deepEqual([...last.values], [0, 1, 1, 0]);
  assert.match(last.note!, /week 53 counts with week 52/);
  const short = await year(0, ["2021-W51", "2021-W52", "2022-W01"]);
  assert.doesNotMatch(only(seasonal(), short).note!, /week 53/);
});

test("waves repeat with their period; the sine at half the period is left out", async () => {
  const table = await quarters(24);
  assert.deepEqual(names(fourier(2), table), ["cos 2πt/4", "sin 2πt/4", "cos 4πt/4"]);
  assert.deepEqual(names([fourier(1), fourier(1, 6.5)], table).slice(2), ["cos 2πt/6.5", "sin 2πt/6.5"]);
  assert.equal(only(fourier(1), table).note, "waves have t = 0 in 2000Q1");
  const wave = values(fourier(1, 6.5), table);
  agree([1 + wave[0]! - wave[13]!], [1], 12); // 13 = 2 × 6.5
  const [cosine, sine] = columnsOf(fourier(1, 7), table).map((column) => column.values);
  const angle = (2 * Math.PI * (20 * 4 + 3)) / 7;
  agree([cosine![3]!, sine![3]!], [Math.cos(angle), Math.sin(angle)], 11);
  assert.deepEqual(names(fourier(1), await weeks()), ["cos 2πt/52.178", "sin 2πt/52.178"]);
});

test("waves that cannot be are refused", async () => {
  const table = await quarters(8);
  assert.throws(() => fourier(0), /number of waves must be 1, 2/);
  assert.throws(() => values(fourier(3), table), /3 waves need a period of at least 6 steps, not 4/);
  assert.throws(() => values(fourier(1, 1), table), /longer than one step/);
  const plain = await load(
    [1, 2, 3].map((t) => ({ t })),
    { time: "t", every: "integer" },
  );
  assert.throws(() => values(fourier(1), plain), /have no season; give the period/);
  assert.throws(() => values(seasonal(), plain), /have no season; use fourier\(n, period\)/);
});
