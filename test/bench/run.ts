/*
 * npm run bench: times and ratios of Lagbook beside general-purpose numerics on the same data in the same run.
 *
 *   npm run bench              all of them
 *   npm run bench -- fit hac   those named: fit, hac, comparison, load, kernel
 */
import { mkdirSync, mkdtempSync, rmSync } from "node:fs";
import { cpus, loadavg } from "node:os";
import { join } from "node:path";
import { places } from "../../kernel/install/index.js";
import type { BenchRun } from "./bench.js";
import { benchComparison } from "./comparison.js";
import { benchFit } from "./fit.js";
import { benchHac } from "./hac.js";
import { benchKernel } from "./kernel.js";
import { benchLoad } from "./load.js";
import { Numpy } from "./numpy.js";
import { printed } from "./table.js";

const benches: Readonly<Record<string, BenchRun>> = {
  fit: benchFit,
  hac: benchHac,
  comparison: benchComparison,
  load: benchLoad,
  kernel: benchKernel,
};

const wanted = process.argv.slice(2);
const unknown = wanted.find((name) => !(name in benches));
if (unknown) {
  console.error(
    `bench: there is no ${JSON.stringify(unknown)}; there are ${Object.keys(benches).join(", ")}.`,
  );
  process.exit(1);
}
mkdirSync(places().state, { recursive: true });
const folder = mkdtempSync(join(places().state, "bench-"));
const numpy = Numpy.start();
console.log(
  `${cpus().length} × ${cpus()[0]!.model.trim()}, load ${loadavg()[0]!.toFixed(1)}, Node ${process.version}, ` +
    `${numpy ? `numpy ${numpy.version}` : "no numpy found: run npm start or npm test once to set it up, or install it for python3"}\n`,
);
try {
  for (const [name, bench] of Object.entries(benches)) {
    if (wanted.length && !wanted.includes(name)) continue;
    console.log(printed(await bench({ folder, numpy })));
  }
} finally {
  numpy?.close();
  rmSync(folder, { recursive: true, force: true });
}
