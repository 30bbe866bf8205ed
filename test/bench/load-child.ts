/* Loads the file named and tells the seconds and the peak memory of this process. */
import { load } from "../../src/data/index.js";

const start = performance.now();
const table = await load(process.argv[2]!, { time: "time", every: "minute" });
const seconds = (performance.now() - start) / 1000;
if (table.columns.length !== 10 || table.T !== 1_000_000) throw new Error("bench: the table is not whole");
console.log(JSON.stringify({ seconds, kilobytes: process.resourceUsage().maxRSS }));
