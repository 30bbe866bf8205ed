// Writes ferry.csv: five years of an invented ferry line across an invented bay, one row a week.
// Nothing here is measured anywhere. Seed 2021; run from the project's top folder: npx tsx notebooks-demo/data/ferry.ts
//
// What the invented world obeys, so that an analysis can be held against it: thousands of riders a week =
//   14.2 − 0.70 fare − 0.35 fare (one week before) − 0.016 rain + 1.1 fuel + 0.28 holidays − 0.55 from 2021-W30
//   + a yearly wave + u,   u = 0.65 u (one week before) + e,   sd(e) = 0.38 + 0.09 holidays.
import { writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { counterRandom } from "../../src/numeric/index.js";

const seed = 2021;
const random = counterRandom(seed, 0);
const burnIn = 100;

/** Days of school holidays in week `week` of the year, the same every year in this town. */
function holidayDays(week: number): number {
  if (week === 52 || week === 1) return 5;
  if (week === 7 || week === 42) return 5;
  if (week === 14 || week === 15) return 4;
  if (week >= 28 && week <= 33) return 7;
  return 0;
}

/** ISO weeks from 2019-W01 to 2023-W52; 2020 has a week 53. */
function weeks(): { year: number; week: number }[] {
  const list: { year: number; week: number }[] = [];
  for (let year = 2019; year <= 2023; year++) {
    for (let week = 1; week <= (year === 2020 ? 53 : 52); week++) list.push({ year, week });
  }
  return list;
}

let rainState = 0;
let fuel = 1.52;
let discount = 0;
let error = 0;
let fareBefore = 4.1;
const lines = ["week,riders,fare,rain,fuel,holidays"];
for (let i = 0; i < burnIn; i++) error = 0.65 * error + 0.38 * random.normal();
weeks().forEach(({ year, week }, t) => {
  const afterChange = year > 2021 || (year === 2021 && week >= 30);
  const holidays = holidayDays(week);
  rainState = 0.45 * rainState + random.normal();
  const rain = Math.max(0, 17 + 8 * Math.cos((2 * Math.PI * (week + 4)) / 52.18) + 9 * rainState);
  fuel = Math.max(1.1, 1.58 + 0.97 * (fuel - 1.58) + 0.028 * random.normal());
  discount = 0.8 * discount + 0.16 * random.normal();
  const list = 4.1 + 0.12 * (year - 2019) + (afterChange ? 0.65 : 0);
  const fare = Math.max(2.5, list + discount);
  error = 0.65 * error + (0.38 + 0.09 * holidays) * random.normal();
  const wave = 0.9 * Math.cos((2 * Math.PI * (t - 30)) / 52.18);
  const thousands =
    14.2 - 0.7 * fare - 0.35 * fareBefore - 0.016 * rain + 1.1 * fuel + 0.28 * holidays - (afterChange ? 0.55 : 0) + wave + error;
  fareBefore = fare;
  const label = `${year}-W${String(week).padStart(2, "0")}`;
  lines.push([label, Math.round(1000 * thousands), fare.toFixed(2), rain.toFixed(1), fuel.toFixed(3), holidays].join(","));
});
writeFileSync(join(dirname(fileURLToPath(import.meta.url)), "ferry.csv"), `${lines.join("\n")}\n`);
