import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import {
  first,
  last,
  load,
  max,
  min,
  parsePeriod,
  parsePeriodEnd,
  periodDate,
  periodLabel,
  type StepUnit,
  TimeTable,
} from "../../src/data/index.js";
import { ordinalOfInstant } from "../../src/data/time/calendar.js";
import { lag, lead } from "../../src/design/index.js";
import { columnsOf } from "../../src/design/resolve.js";

const settings = { seed: 20261, numRuns: 150 };

/** Tables of whole numbers, where sums are exact, with gaps and missing values. */
const tables = (unit: StepUnit, longest = 200) =>
  fc
    .record({
      start: fc.integer({ min: -400, max: 800 }),
      steps: fc.array(
        fc.record({ gap: fc.constantFrom(1, 1, 1, 1, 2, 5), x: fc.integer({ min: -999, max: 999 }) }),
        {
          minLength: 3,
          maxLength: longest,
        },
      ),
      missing: fc.array(fc.nat(longest), { maxLength: 4 }),
    })
    .map(({ start, steps, missing }) => {
      const step = { unit, count: 1 };
      let ordinal = ordinalOfInstant(step, Date.UTC(2000, 0, 1)) + start;
      const ordinals = Float64Array.from(steps, ({ gap }) => (ordinal += gap));
      const values = Float64Array.from(steps, ({ x }, i) => (missing.includes(i) ? Number.NaN : x));
      return new TimeTable({
        index: { step, name: "t", ordinals },
        columns: [{ name: "x", kind: "number", values }],
        provenance: [],
      });
    });

const present = (values: Float64Array) => values.filter((x) => !Number.isNaN(x));
const total = (values: Float64Array) => present(values).reduce((a, b) => a + b, 0);
const sumOfPresent = (values: Float64Array) => total(values);

test("bringing a series to a coarser step preserves its total, also in two steps, and its extremes", () => {
  fc.assert(
    fc.property(tables("day"), (days) => {
      const parts = { parts: true } as const;
      const of = (table: TimeTable) => total(table.numbers("x"));
      const months = days.to("month", { x: sumOfPresent }, parts);
      for (const coarse of [
        months,
        days.to("week", { x: sumOfPresent }, parts),
        days.to("quarter", { x: sumOfPresent }, parts),
        months.to("quarter", { x: sumOfPresent }, parts),
        months.to("year", { x: sumOfPresent }, parts),
      ]) {
        assert.equal(of(coarse), of(days));
      }
      const byMonth = months.to("quarter", { x: sumOfPresent }, parts);
      const direct = days.to("quarter", { x: sumOfPresent }, parts);
      assert.equal(byMonth.fingerprint, direct.fingerprint);
      const full = days.dropMissing();
      fc.pre(full.T > 0);
      const values = full.numbers("x");
      const years = (how: typeof max) => full.to("year", { x: how }, parts).numbers("x");
      assert.equal(Math.max(...years(max)), Math.max(...values));
      assert.equal(Math.min(...years(min)), Math.min(...values));
      assert.equal(years(first)[0], values[0]);
      assert.equal(years(last).at(-1), values[values.length - 1]);
    }),
    settings,
  );
});

test("lag then lead is the column itself; a lag alone is what stood there, in time and not in rows", () => {
  fc.assert(
    fc.property(tables("month"), fc.integer({ min: 0, max: 6 }), (months, steps) => {
      const [back] = columnsOf(lead(lag("x", steps), steps), months);
      const x = months.numbers("x");
      const at = new Map(Array.from(months.index.ordinals, (ordinal, row) => [ordinal, row]));
      back!.values.forEach((value, row) => {
        assert.ok(Object.is(value, x[row]), `row ${row}`);
      });
      const [lagged] = columnsOf(lag("x", steps), months);
      lagged!.values.forEach((value, row) => {
        const source = at.get(months.index.ordinals[row]! - steps);
        assert.ok(Object.is(value, source === undefined ? Number.NaN : x[source]));
      });
    }),
    settings,
  );
});

test("joins of tables over the same periods commute, and joining is the same before and after a stretch is cut", () => {
  fc.assert(
    fc.property(tables("week", 60), (weeks) => {
      const a = weeks.rename({ x: "a" });
      const b = weeks.define({ b: (row) => row.x + 1 }).select("b");
      const content = (table: TimeTable) => table.select("a", "b").fingerprint;
      assert.equal(content(a.join(b)), content(b.join(a)));
      const middle = weeks.periods[Math.floor(weeks.T / 2)]!;
      assert.equal(
        content(a.join(b).between(undefined, middle)),
        content(a.between(undefined, middle).join(b.between(undefined, middle))),
      );
      const months = weeks.to("month", { x: (values) => values.length }, { parts: true }).rename({ x: "m" });
      const one = a.join(months).join(b);
      const other = a.join(b).join(months);
      assert.equal(one.select("a", "b", "m").fingerprint, other.select("a", "b", "m").fingerprint);
    }),
    settings,
  );
});

test("filling leaves what is there, fills every hole inside, and marks exactly what it filled", () => {
  fc.assert(
    fc.property(tables("day", 80), (days) => {
      const x = days.numbers("x");
      fc.pre(present(x).length > 1);
      const filled = days.fill("x", "linear");
      const { values, filled: marks } = filled.column("x");
      assert.equal(filled.T, days.index.ordinals.at(-1)! - days.index.ordinals[0]! + 1);
      const at = new Map(Array.from(days.index.ordinals, (ordinal, row) => [ordinal, row]));
      filled.index.ordinals.forEach((ordinal, row) => {
        const before = at.has(ordinal) ? x[at.get(ordinal)!]! : Number.NaN;
        const now = values[row] as number;
        if (!Number.isNaN(before)) assert.equal(now, before);
        assert.equal(marks![row], Number.isNaN(before) && !Number.isNaN(now) ? 1 : 0);
      });
      const isHole = (i: number) => Number.isNaN(values[i] as number);
      const inside = Array.from(values.keys()).filter((i) => isHole(i));
      const firstThere = values.findIndex((value) => !Number.isNaN(value as number));
      assert.ok(
        inside.every(
          (i) => i < firstThere || values.slice(i).every((value) => Number.isNaN(value as number)),
        ),
      );
    }),
    settings,
  );
});

test("sorting undoes any order of rows", async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.shuffledSubarray(
        Array.from({ length: 30 }, (_, i) => i),
        { minLength: 3 },
      ),
      async (order) => {
        const rows = order.map((i) => ({ t: `${1990 + i}`, x: i }));
        const table = await load(rows, { time: "t", sort: true, every: "year" });
        const sorted = [...order].sort((a, b) => a - b);
        assert.deepEqual(Array.from(table.numbers("x")), sorted);
        assert.deepEqual(
          table.periods,
          sorted.map((i) => `${1990 + i}`),
        );
      },
    ),
    { seed: 20262, numRuns: 60 },
  );
});

test("a label names its period, and a longer name the periods in it", () => {
  const units = [
    "year",
    "half-year",
    "quarter",
    "month",
    "week",
    "day",
    "business-day",
    "hour",
    "minute",
  ] as const;
  fc.assert(
    fc.property(fc.constantFrom(...units), fc.integer({ min: -3000, max: 3000 }), (unit, distance) => {
      const step = { unit, count: 1 };
      const ordinal =
        ordinalOfInstant(step, Date.UTC(2000, 0, 1)) + (unit === "year" ? distance % 900 : distance);
      const label = periodLabel({ step }, ordinal);
      assert.equal(parsePeriod({ step }, label), ordinal);
      const year = periodDate(step, ordinal).getUTCFullYear();
      const text = String(year).padStart(4, "0");
      const [from, to] = [parsePeriod({ step }, text), parsePeriodEnd({ step }, text)];
      assert.ok(to >= ordinal && from <= ordinal + 1, `${label} in ${from}..${to}`);
      if (unit !== "week") assert.equal(periodDate(step, to).getUTCFullYear(), year);
    }),
    { seed: 20263, numRuns: 2000 },
  );
});
