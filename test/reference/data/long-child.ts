/* Loads the long file named and tells its rows, the sums of its columns and the peak memory of this process. */
import { load, sum } from "../../../src/data/index.js";

const table = await load(process.argv[2]!, { time: "time" });
const sums = table.names.map((name) => sum(table.numbers(name)));
console.log(
  JSON.stringify({ T: table.T, names: table.names, sums, kilobytes: process.resourceUsage().maxRSS }),
);
