// Writes kiosk.csv: a year of an invented kiosk on an invented quay, one row a day, written down as such files are:
// days before months, decimal commas, semicolons, a stretch entered late, days entered twice, days not entered, days
// marked "shut". Nothing here is measured anywhere. Seed 2023; run from the project's top folder:
// npx tsx notebooks-demo/data/kiosk.ts
import { writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { counterRandom } from "../../src/numeric/index.js";

const random = counterRandom(2023, 0);
const day = 86_400_000;
const start = Date.UTC(2023, 0, 2); // a Monday
const number = (value: number, digits: number) => {
  const [whole, fraction] = value.toFixed(digits).split(".");
  const grouped = whole!.replace(/\B(?=(\d{3})+$)/g, ".");
  return fraction ? `${grouped},${fraction}` : grouped;
};

let carried = 0;
const rows: string[] = [];
for (let t = 0; t < 364; t++) {
  const date = new Date(start + t * day);
  const weekend = date.getUTCDay() % 6 === 0 ? 1 : 0;
  const warm = 11 - 9 * Math.cos((2 * Math.PI * (t - 14)) / 365.25) + 2.5 * random.normal();
  carried = 0.5 * carried + 90 * random.normal();
  const takings = Math.max(60, 620 + 24 * warm + 210 * weekend + carried);
  const written = [date.getUTCDate(), date.getUTCMonth() + 1].map((part) => String(part).padStart(2, "0"));
  const shut = t % 61 === 40;
  const note = shut ? '"shut: stocktaking;\nback tomorrow"' : "";
  rows.push([`${written.join("/")}/2023`, shut ? "shut" : number(takings, 2), number(warm, 1), note].join(";"));
}
const late = rows.splice(200, 7);
rows.splice(230, 0, ...late); // a week entered after the month that follows it
rows.splice(120, 0, rows[118]!, rows[119]!); // two days entered twice
rows.splice(300, 4); // four days never entered
writeFileSync(
  join(dirname(fileURLToPath(import.meta.url)), "kiosk.csv"),
  `day;takings;warmth;note\r\n${rows.join("\r\n")}\r\n`,
);
