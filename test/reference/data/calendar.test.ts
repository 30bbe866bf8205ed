import assert from "node:assert/strict";
import { test } from "node:test";
import { load, parsePeriod, periodDate, periodLabel, sum } from "../../../src/data/index.js";
import { ordinalOfInstant, startOfPeriod } from "../../../src/data/time/calendar.js";
import { readInstant } from "../../../src/data/time/forms.js";
import { zoneClock } from "../../../src/data/time/zone.js";
import { fixture } from "../../root.js";

/** From Python's datetime and zoneinfo (make_calendar.py); every value agrees exactly. */
const python = fixture<{
  weeks: [string, number, number][];
  leap: [number, number][];
  business: [string, number][];
  zones: {
    zone: string;
    samples: [number, number][];
    skipped: string[];
    twice: [string, number, number][];
  }[];
  oddDaysInOslo: Record<string, number>;
  daysInOslo: number;
}>("reference/data/calendar/calendar.json");

const week = { unit: "week", count: 1 } as const;

test("ISO weeks of the days around 213 turns of the year", () => {
  assert.ok(python.weeks.length > 1900);
  for (const [day, year, number] of python.weeks) {
    const label = `${String(year).padStart(4, "0")}-W${String(number).padStart(2, "0")}`;
    const ordinal = parsePeriod({ step: week }, day);
    assert.equal(periodLabel({ step: week }, ordinal), label, day);
    assert.equal(parsePeriod({ step: week }, label), ordinal, label);
  }
});

test("a 53rd week is one only where the year has it", () => {
  const has53 = new Set(python.weeks.filter(([, , number]) => number === 53).map(([, year]) => year));
  for (let year = 1897; year < 2105; year++) {
    assert.equal("problem" in readInstant(`${year}-W53`), !has53.has(year), String(year));
  }
});

test("length of February in leap years and centuries", () => {
  const month = { unit: "month", count: 1 } as const;
  for (const [year, days] of python.leap) {
    const february = parsePeriod({ step: month }, `${year}-02`);
    const length = periodDate(month, february + 1).getTime() - periodDate(month, february).getTime();
    assert.equal(length / 86_400_000, days, String(year));
    assert.equal("problem" in readInstant(`${year}-02-29`), days === 28, String(year));
  }
});

test("business days follow each other across weekends", () => {
  const step = { unit: "business-day", count: 1 } as const;
  const origin = parsePeriod({ step }, python.business[0]![0]);
  for (const [day, count] of python.business) {
    assert.equal(parsePeriod({ step }, day) - origin, count, day);
    assert.equal(periodLabel({ step }, origin + count), day);
  }
});

for (const { zone, samples, skipped, twice } of python.zones) {
  test(`the clock of ${zone} around every change from 2015 to 2035`, () => {
    const clock = zoneClock(zone);
    for (const [instant, minutes] of samples) {
      assert.equal(clock.wallOf(instant) - instant, minutes * 60_000, new Date(instant).toISOString());
      assert.ok(clock.instantsOf(clock.wallOf(instant)).includes(instant));
    }
    for (const wall of skipped) assert.deepEqual(clock.instantsOf(Date.parse(`${wall}Z`)), [], wall);
    for (const [wall, ...instants] of twice) {
      assert.deepEqual(clock.instantsOf(Date.parse(`${wall}Z`)), instants, wall);
    }
    assert.equal(samples.length > 0, zone !== "UTC" && zone !== "Asia/Kolkata");
  });
}

test("hours make up days of 23, 24 and 25 hours", async () => {
  const rows = [];
  const start = Date.parse("2022-12-31T23:00Z"); // midnight in Oslo
  const end = Date.parse("2024-12-31T23:00Z");
  for (let at = start; at < end; at += 3_600_000) rows.push({ time: new Date(at).toISOString(), hours: 1 });
  const hours = await load(rows, { time: "time", zone: "Europe/Oslo" });
  assert.deepEqual(hours.index.step, { unit: "hour", count: 1 });
  const days = hours.to("day", { hours: sum });
  assert.equal(days.T, python.daysInOslo);
  const odd: Record<string, number> = {};
  days.periods.forEach((day, i) => {
    if (days.numbers("hours")[i] !== 24) odd[day] = days.numbers("hours")[i]!;
  });
  assert.deepEqual(odd, python.oddDaysInOslo);
});

test("a period starts where its label says, for every unit", () => {
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
  for (const unit of units) {
    for (const count of [1, 3]) {
      const step = { unit, count };
      const origin = ordinalOfInstant(step, 0);
      for (let ordinal = origin - 600; ordinal < origin + 600; ordinal += 7) {
        const start = startOfPeriod(step, ordinal);
        assert.equal(ordinalOfInstant(step, start), ordinal);
        // A moment of a weekend counts to the Monday after it.
        if (unit !== "business-day") assert.equal(ordinalOfInstant(step, start - 1), ordinal - 1);
        assert.equal(parsePeriod({ step }, periodLabel({ step }, ordinal)), ordinal, `${unit} ${count}`);
      }
    }
  }
});
