import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { createWriteStream } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { counterRandom } from "../../src/numeric/index.js";
import type { Bench } from "./bench.js";
import { pythonWith } from "./numpy.js";
import { duration, ratio, type Table } from "./table.js";
import { median } from "./timing.js";

const rows = 1_000_000;
const columns = 10;

/** Loading a million rows of ten full-precision columns: seconds inside a fresh process, and its peak memory. */
export async function benchLoad({ folder }: Bench): Promise<Table> {
  const csv = join(folder, "million.csv");
  const parquet = join(folder, "million.parquet");
  await writeCsv(csv);
  await writeParquet(csv, parquet);
  const python = pythonWith("numpy");
  const side = fileURLToPath(new URL("./load-child.js", import.meta.url));
  const ours = (file: string) => measured(3, process.execPath, [side, file]);
  const own = await ours(csv);
  const lines = [["CSV, load", ...own.cells, ""]];
  const fromParquet = await ours(parquet);
  lines.push(["Parquet, load", ...fromParquet.cells, ""]);
  if (python) {
    for (const reader of ["loadtxt", "genfromtxt"]) {
      const theirs = await measured(1, python, ["-c", script(reader), csv]);
      lines.push([`CSV, numpy ${reader}`, ...theirs.cells, ratio(theirs.seconds, own.seconds)]);
    }
  }
  return {
    title: `Load of ${rows} rows × ${columns} columns of 15 to 17 digits and a time column`,
    heads: ["", "time", "peak memory", "against CSV, load"],
    rows: lines,
  };
}

const script = (reader: string): string => `
import json, resource, sys, time
import numpy as np
start = time.perf_counter()
np.${reader}(sys.argv[1], delimiter=",", ${reader === "loadtxt" ? "skiprows" : "skip_header"}=1, usecols=range(1, ${columns + 1}))
print(json.dumps({"seconds": time.perf_counter() - start, "kilobytes": resource.getrusage(resource.RUSAGE_SELF).ru_maxrss}))
`;

async function measured(runs: number, command: string, args: string[]) {
  const times: number[] = [];
  const peaks: number[] = [];
  for (let run = 0; run < runs; run++) {
    const child = spawn(command, args, { stdio: ["ignore", "pipe", "inherit"] });
    const { seconds, kilobytes } = JSON.parse(await outputOf(child)) as {
      seconds: number;
      kilobytes: number;
    };
    times.push(seconds);
    peaks.push(kilobytes);
  }
  const seconds = median(times);
  return { seconds, cells: [duration(seconds), `${Math.round(median(peaks) / 1024)} MB`] };
}

async function outputOf(child: ChildProcess): Promise<string> {
  let text = "";
  child.stdout!.on("data", (part) => (text += part));
  const [code] = (await once(child, "close")) as [number];
  if (code !== 0) throw new Error(`bench: ${child.spawnargs[0]} ended with ${code}`);
  return text;
}

/** Minutes from the start of 2001, and ten columns of random numbers written in full. */
async function writeCsv(file: string): Promise<void> {
  const out = createWriteStream(file);
  out.write(`time,${Array.from({ length: columns }, (_, j) => `x${j + 1}`).join(",")}\n`);
  const random = counterRandom(7, 1);
  const origin = Date.UTC(2001, 0, 1);
  for (let from = 0; from < rows; from += 10_000) {
    let text = "";
    for (let t = from; t < from + 10_000; t++) {
      text += new Date(origin + t * 60_000).toISOString().slice(0, 16);
      for (let j = 0; j < columns; j++) text += `,${random.normal()}`;
      text += "\n";
    }
    if (!out.write(text)) await once(out, "drain");
  }
  out.end();
  await once(out, "finish");
}

async function writeParquet(csv: string, parquet: string): Promise<void> {
  const { DuckDBInstance } = await import("@duckdb/node-api");
  const connection = await (await DuckDBInstance.create(":memory:")).connect();
  await connection.run(`COPY (SELECT * FROM read_csv('${csv}')) TO '${parquet}' (FORMAT parquet)`);
  connection.closeSync();
}
