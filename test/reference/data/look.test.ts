import assert from "node:assert/strict";
import { test } from "node:test";
import { load, look, type StepUnit, TimeTable } from "../../../src/data/index.js";
import { counterRandom } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree } from "../../support/digits.js";

/** By numpy's correlate (make_look.py); agreement to 12 digits. */
const numpy = fixture<{ x: number[]; y: (number | null)[]; acfX: number[]; acfY: number[]; ccf: number[] }>(
  "reference/data/look/look.json",
);
const months = numpy.x.map((x, i) => ({
  t: `${2000 + Math.floor(i / 12)}-${String((i % 12) + 1).padStart(2, "0")}`,
  x,
  y: numpy.y[i]!,
  c: 5,
  note: "n",
}));

/** A table of these columns over periods 0, 1, 2, ... */
function counted(columns: Record<string, Float64Array>, unit: StepUnit = "integer"): TimeTable {
  const [first] = Object.values(columns);
  return new TimeTable({
    index: { step: { unit, count: 1 }, name: "t", ordinals: Float64Array.from(first!, (_, t) => t) },
    columns: Object.entries(columns).map(([name, values]) => ({ name, kind: "number", values })),
    provenance: [],
  });
}

test("autocorrelations and cross-correlations, missing periods as the mean", async () => {
  const table = await load(months, { time: "t" });
  const { series, periodsPerBin, band, remarks } = look(table, ["x", "y"]);
  const values = (lags: readonly { value: number }[]) => lags.map(({ value }) => value);
  agree(values(series[0]!.autocorrelation), numpy.acfX, 12);
  agree(values(series[1]!.autocorrelation), numpy.acfY, 12);
  agree(values(series[1]!.withFirst!), numpy.ccf, 12);
  assert.deepEqual([series[1]!.withFirst![0]!.lag, series[1]!.withFirst!.at(-1)!.lag], [-24, 24]);
  // y follows x by two months.
  const peak = series[1]!.withFirst!.reduce((a, b) => (b.value > a.value ? b : a));
  assert.equal(peak.lag, 2);
  assert.equal(periodsPerBin, 1);
  agree([band], [1.959963984540054 / Math.sqrt(116)], 14);
  assert.ok(series[1]!.bandWithFirst! > band, "two persistent series agree by chance more often");
  assert.ok(remarks.some(({ text }) => text.includes('"y" is missing in 4 of 120')));
});

test("without names, what does not vary is left out and said; with names it is refused", async () => {
  const table = await load(months, { time: "t" });
  const whole = look(table);
  assert.deepEqual(
    whole.series.map(({ name }) => name),
    ["x", "y"],
  );
  assert.match(whole.remarks[0]!.text, /do not vary: "c"/);
  assert.throws(() => look(table, ["c"]), /look: "c" does not vary/);
  assert.throws(() => look(table, ["note"]), /holds text/);
  assert.throws(() => look(table, ["z"]), /no column "z"/);
  assert.throws(() => look(table, []), /no column is named/);
});

test("a million points: aggregated for the chart, said so, correlations of all", () => {
  const T = 1_000_000;
  const values = counterRandom(5, 1).fillNormal(new Float64Array(T));
  values[777_777] = 99;
  for (let t = 1; t < T; t++) values[t]! += 0.6 * values[t - 1]!;
  const table = counted({ x: values }, "minute");
  const { series, remarks } = look(table);
  assert.ok(series[0]!.bins.length <= 600);
  assert.equal(
    series[0]!.bins.reduce((sum, { count }) => sum + count, 0),
    T,
  );
  assert.ok(Math.max(...series[0]!.bins.map(({ high }) => high)) > 90);
  assert.match(remarks[0]!.text, /mean and range of every 1667 minutes; correlations use every period/);
  series[0]!.autocorrelation.slice(0, 5).forEach(({ value }, j) => {
    assert.ok(Math.abs(value - 0.6 ** (j + 1)) < 0.006, `lag ${j + 1}: ${value}`);
  });
});

test("bands: unrelated persistent series leave theirs about as often as said", () => {
  let outside = 0;
  let all = 0;
  for (let replicate = 0; replicate < 400; replicate++) {
    const random = counterRandom(9, replicate);
    const [a, b] = [0, 1].map(() => {
      const values = random.fillNormal(new Float64Array(200));
      for (let t = 1; t < 200; t++) values[t]! += 0.8 * values[t - 1]!;
      return values;
    });
    const found = look(counted({ a: a!, b: b! })).series[1]!;
    for (const { lag, value } of found.withFirst!) {
      if (Math.abs(lag) > 3) continue;
      all++;
      if (Math.abs(value) > found.bandWithFirst!) outside++;
    }
  }
  // 1.96/√T alone would leave out about 35%.
  assert.ok(outside / all < 0.1, `${outside} of ${all}`);
});
