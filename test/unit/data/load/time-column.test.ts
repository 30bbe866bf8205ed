import assert from "node:assert/strict";
import { test } from "node:test";
import { load, stepName, type TimeTable } from "../../../../src/data/index.js";
import type { LoadOptions } from "../../../../src/data/load/options.js";
import { said } from "./scratch.js";

function times(
  texts: readonly (string | number | Date)[],
  options: Partial<LoadOptions> = {},
): Promise<TimeTable> {
  return load(
    texts.map((t, i) => ({ t, x: i })),
    { time: "t", ...options },
  );
}

const step = async (texts: readonly (string | number | Date)[], options = {}) =>
  stepName((await times(texts, options)).index.step);

test("each written form and its step", async () => {
  for (const [texts, name, label] of [
    [["1987", "1988", "1989"], "year", "1987"],
    [["2023H1", "2023H2", "2024H1"], "half-year", "2023H1"],
    [["2023Q4", "2024Q1", "2024Q2"], "quarter", "2023Q4"],
    [["2023-Q4", "2024-Q1"], "quarter", "2023Q4"],
    [["2023-12", "2024-01"], "month", "2023-12"],
    [["2020-W53", "2021-W01"], "week", "2020-W53"],
    [["2024-02-28", "2024-02-29", "2024-03-01"], "day", "2024-02-28"],
    [["2024-03-04", "2024-03-11"], "week", "2024-W10"],
    [["2024-03-07", "2024-03-08", "2024-03-11"], "business day", "2024-03-07"],
    [["2024-01-01", "2024-02-01", "2024-03-01"], "month", "2024-01"],
    [["2024-01-31", "2024-02-29", "2024-03-31"], "month", "2024-01"],
    [["2024-01-15", "2024-02-15"], "month", "2024-01"],
    [["2023-01-01", "2023-04-01", "2023-07-01"], "quarter", "2023Q1"],
    [["2023-03-31", "2023-06-30", "2023-09-30"], "quarter", "2023Q1"],
    [["2022-12-31", "2023-12-31"], "year", "2022"],
    [["2023-06-30", "2023-12-31"], "half-year", "2023H1"],
    [["2023-06-01", "2024-06-01"], "12 months", "2023-06"],
    [["2024-03-05T14:00", "2024-03-05T15:00"], "hour", "2024-03-05 14:00"],
    [["2024-03-05 14:00:00", "2024-03-05 14:15:00"], "15 minutes", "2024-03-05 14:00"],
    [["2024-03-05T14:00:00.250Z", "2024-03-05T14:00:00.500Z"], "250 milliseconds", "2024-03-05 14:00:00.250"],
    [["2024-03-05T14:00+02:00", "2024-03-05T15:00+02:00"], "hour", "2024-03-05 12:00"],
    [["2024-03-05T14:00", "2024-03-06T14:00"], "day", "2024-03-05"],
    [[1, 2, 3], "integer", "1"],
    [["0", "10", "20"], "10 integers", "0"],
    [["-3", "-2"], "integer", "-3"],
    [[1950, 1951], "year", "1950"],
    [["0980", "0981"], "integer", "980"],
    [[new Date("2024-03-05"), new Date("2024-03-06")], "day", "2024-03-05"],
    [[new Date("2024-03-05T01:00Z"), new Date("2024-03-05T02:00Z")], "hour", "2024-03-05 01:00"],
  ] as const) {
    const table = await times(texts);
    assert.equal(stepName(table.index.step), name, texts.join());
    assert.equal(table.periods[0], label, texts.join());
    const distances = table.index.ordinals.slice(1).map((ordinal, i) => ordinal - table.index.ordinals[i]!);
    assert.ok(
      distances.every((distance) => distance === 1),
      `${texts.join()}: ${distances.join()}`,
    );
  }
});

test("a stated step", async () => {
  assert.equal(await step(["2024-03-05"], { every: "month" }), "month");
  assert.equal(await step(["2024-03-05T14:00", "2024-03-05T16:00"], { every: "hours" }), "hour");
  assert.equal(await step(["2024-03-05", "2024-03-06"], { every: "business day" }), "business day");
  assert.equal(await step(["1950", "1951"], { every: "integer" }), "integer");
  assert.equal(await step(["2024-01-01", "2024-01-15"], { every: { unit: "week", count: 2 } }), "2 weeks");
  await assert.rejects(times(["2024-03-05"]), /one period does not tell the step of "t"; state it/);
  await assert.rejects(
    times(["2024Q1", "2024Q2"], { every: "week" }),
    /written as quarter, which does not fit every: "week"/,
  );
  await assert.rejects(
    times(["2024-01", "2024-02"], { every: "mnoth" }),
    /"mnoth" is no step of time. Did you mean "month"/,
  );
  await assert.rejects(
    times(["2024-03-08", "2024-03-09"], { every: "business-day" }),
    /row 2.*2024-03-09 is a Saturday/,
  );
});

test("an ambiguous date is refused until its order is said", async () => {
  const texts = ["03/04/2024", "04/04/2024", "05/04/2024"];
  await assert.rejects(
    times(texts),
    /row 1 of .*time column "t": "03\/04\/2024".*dates: "day-month" or dates: "month-day"/,
  );
  assert.deepEqual((await times(texts, { dates: "day-month" })).periods, [
    "2024-04-03",
    "2024-04-04",
    "2024-04-05",
  ]);
  assert.deepEqual(
    (await times(texts, { dates: "month-day" })).periods,
    ["2024-03", "2024-04", "2024-05"].map((m) => m),
  );
  await assert.rejects(
    times(["03/13/2024", "03/14/2024"], { dates: "day-month" }),
    /row 1.*there is no such date/,
  );
  assert.equal((await times(["3.4.2024", "4.4.2024"], { dates: "day-month" })).periods[0], "2024-04-03");
});

test("what is no period, or another form, is named by its row", async () => {
  const second = (text: string) => times(["2024-03-05", text, "2024-03-07"]);
  await assert.rejects(second("2024-02-30"), /row 2.*"2024-02-30": there is no such date/);
  await assert.rejects(second("5 March 2024"), /row 2.*no known written form/);
  await assert.rejects(
    second("2024-03"),
    /row 2.*"2024-03" is written otherwise than row 1 \("2024-03-05"\)/,
  );
  await assert.rejects(second(""), /row 2.*blank. Every row needs a period/);
  await assert.rejects(times(["2021-W53", "2022-W01"]), /row 1.*"2021-W53": there is no such date/);
  await assert.rejects(times(["2024-03-05T25:00", "2024-03-05T26:00"]), /no such date and time/);
  await assert.rejects(
    times(["2024-03-05T10:00:00.0001", "2024-03-05T10:00:01"]),
    /finer than a millisecond/,
  );
  await assert.rejects(
    times(["2024-03-05T10:00Z", "2024-03-05T11:00"]),
    /row 2.*written otherwise without an offset/,
  );
  await assert.rejects(
    times(["March", "April"]),
    /"March" is no written period. Written forms: 2024, 2024H1/,
  );
  await assert.rejects(times([1, 2.5]), /row 2.*2.5 is no whole number/);
});

test("unsorted, backward and doubled rows are refused unless said", async () => {
  await assert.rejects(
    times(["2024", "2026", "2025"]),
    /row 3 \(2025\) comes after row 2 \(2026\). Say sort: true/,
  );
  await assert.rejects(
    times(["2026", "2025", "2024"]),
    /run backwards in time, from 2026 on. Say sort: true/,
  );
  await assert.rejects(
    times(["2024", "2024", "2025"]),
    /rows 1 and 2 both stand for 2024; they differ. Say dedupe/,
  );
  await assert.rejects(
    times(["2025", "2024", "2024", "2024"]),
    /rows 2, 3 and 4 all stand for 2024.*backwards|rows 2, 3 and 4 all stand for 2024.*not in order/,
  );
  const table = await times(["2025", "2024", "2024"], { sort: true, dedupe: "last" });
  assert.deepEqual(
    [table.periods, Array.from(table.numbers("x"))],
    [
      ["2024", "2025"],
      [2, 0],
    ],
  );
  assert.equal(table.provenance.length, 3);
});

test("daylight saving: the skipped hour is no time, the repeated one needs a word", async () => {
  const zone = "Europe/Oslo";
  await assert.rejects(
    times(["2024-03-31 01:00", "2024-03-31 02:00", "2024-03-31 03:00"], { zone }),
    /row 2.*2024-03-31 02:00: the clocks of Europe\/Oslo skip this time/,
  );
  const spring = await times(["2024-03-31 01:00", "2024-03-31 03:00"], { zone });
  assert.deepEqual(spring.periods, ["2024-03-31 01:00+01:00", "2024-03-31 03:00+02:00"]);
  assert.equal(spring.index.ordinals[1]! - spring.index.ordinals[0]!, 1);
  const autumn = ["2024-10-27 01:00", "2024-10-27 02:00", "2024-10-27 02:00", "2024-10-27 03:00"];
  await assert.rejects(
    times(autumn, { zone }),
    /row 2.*show this time twice.*repeatedHour: "earlier", "later" or "in order"/,
  );
  const inOrder = await times(autumn, { zone, repeatedHour: "in order" });
  assert.deepEqual(inOrder.periods, [
    "2024-10-27 01:00+02:00",
    "2024-10-27 02:00+02:00",
    "2024-10-27 02:00+01:00",
    "2024-10-27 03:00+01:00",
  ]);
  assert.deepEqual(said(inOrder), []);
  const later = await times(["2024-10-27 02:00", "2024-10-27 03:00"], { zone, repeatedHour: "later" });
  assert.equal(later.index.ordinals[1]! - later.index.ordinals[0]!, 1);
  await assert.rejects(
    times(autumn, { zone: "Europe/Olso" }),
    /"Europe\/Olso" is no time zone. Did you mean "Europe\/Oslo"/,
  );
});

test("midnights on a clock that changes are days, not 23, 24 and 25 hours", async () => {
  const offsets = [
    "2024-03-30T00:00+01:00",
    "2024-03-31T00:00+01:00",
    "2024-04-01T00:00+02:00",
    "2024-04-02T00:00+02:00",
  ];
  for (const options of [{}, { zone: "Europe/Oslo" }]) {
    const table = await times(offsets, options);
    assert.deepEqual(table.periods, ["2024-03-30", "2024-03-31", "2024-04-01", "2024-04-02"]);
  }
  const instants = ["2024-03-29T23:00Z", "2024-03-30T23:00Z", "2024-03-31T22:00Z"].map((t) => new Date(t));
  assert.deepEqual((await times(instants, { zone: "Europe/Oslo" })).periods, [
    "2024-03-30",
    "2024-03-31",
    "2024-04-01",
  ]);
  assert.equal(await step(instants), "hour");
});

test("what was taken for granted is said", async () => {
  assert.deepEqual(said(await times(["2024-03-05T14:00", "2024-03-05T15:00"])), [
    "times carry no offset and were read as UTC",
  ]);
  assert.deepEqual(said(await times(["2024-03-05T14:30Z", "2024-03-05T15:30Z"])), [
    "each time stands for the hour that it falls in",
  ]);
  assert.deepEqual(said(await times(["2024-03-05", "2024-03-12"])), [
    "each date stands for the ISO week that it falls in",
  ]);
  assert.deepEqual(said(await times(["2024-01-31", "2024-02-29"])), [
    "each date stands for the month that it falls in",
  ]);
  assert.deepEqual(said(await times(["2024-01-01", "2024-02-01"])), []);
});

test("mixed steps are said with the first rows that depart", async () => {
  const table = await times([
    "2024-01-01",
    "2024-01-08",
    "2024-01-15",
    "2024-01-17",
    "2024-01-24",
    "2024-01-31",
  ]);
  assert.match(
    said(table).join("\n"),
    /steps are mixed: rows are usually 7 steps of one day apart, but not 2024-01-15 and 2024-01-17/,
  );
});
