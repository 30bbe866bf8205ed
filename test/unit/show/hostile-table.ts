import { load, type TimeTable } from "../../../src/data/index.js";
import { counterRandom } from "../../../src/numeric/index.js";
import { hostile } from "./hostile.js";

/** A monthly table whose columns carry the hostile names, `y` among them, with a gap and a few missing values. */
export function hostileTable(T = 120): Promise<TimeTable> {
  const random = counterRandom(7, 0);
  const rows = Array.from({ length: T }, (_, t) => {
    const xs = hostile.map(() => random.normal());
    const row: Record<string, string | number | null> = {
      "<b>time</b>": `${2010 + Math.floor(t / 12)}-${String((t % 12) + 1).padStart(2, "0")}`,
      ["<u>y</u>"]: xs.reduce((sum, x, j) => sum + (x * (j - 3)) / 4, 10 + random.normal()),
    };
    hostile.forEach((name, j) => {
      row[name] = xs[j]!;
    });
    row["<i>words</i>"] = t % 2 === 0 ? "<fair>" : "&foul";
    row["<s>holes</s>"] = t % 17 === 3 ? null : t;
    return row;
  });
  rows.splice(60, 2);
  return load(rows, { time: "<b>time</b>", every: "month" });
}

/** The outcome's name in that table. */
export const outcome = "<u>y</u>";
