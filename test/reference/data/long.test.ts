import assert from "node:assert/strict";
import { spawn } from "node:child_process";
import { once } from "node:events";
import { createWriteStream, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { extname, join } from "node:path";
import { test } from "node:test";
import { fileURLToPath } from "node:url";

const rows = 5_000_000;

/** Counters and three columns of six decimals whose sums are known exactly in millionths. */
async function write(path: string): Promise<number[]> {
  const out = createWriteStream(path);
  out.write("time,y,x1,x2\n");
  const millionths = [0, 0, 0];
  for (let from = 0; from < rows; from += 20_000) {
    let text = "";
    for (let t = from; t < from + 20_000; t++) {
      text += t + 1;
      for (let j = 0; j < 3; j++) {
        const value = ((t * 7919 + j * 104_729) % 9_000_001) - 4_500_000;
        millionths[j]! += value;
        text += `,${(value / 1e6).toFixed(6)}`;
      }
      text += "\n";
    }
    if (!out.write(text)) await once(out, "drain");
  }
  out.end();
  await once(out, "finish");
  return millionths;
}

test("five million rows load whole within four GiB", async () => {
  const folder = mkdtempSync(join(tmpdir(), "lagbook-long-"));
  try {
    const path = join(folder, "long.csv");
    const millionths = await write(path);
    const child = fileURLToPath(new URL(`./long-child${extname(import.meta.url)}`, import.meta.url));
    const process_ = spawn(process.execPath, [...process.execArgv, child, path], {
      stdio: ["ignore", "pipe", "inherit"],
    });
    let text = "";
    process_.stdout.on("data", (piece) => {
      text += piece;
    });
    const [code] = await once(process_, "close");
    assert.equal(code, 0);
    const { T, names, sums, kilobytes } = JSON.parse(text) as {
      T: number;
      names: string[];
      sums: number[];
      kilobytes: number;
    };
    assert.equal(T, rows);
    assert.deepEqual(names, ["y", "x1", "x2"]);
    sums.forEach((sum, j) => {
      assert.ok(Math.abs(sum * 1e6 - millionths[j]!) < 1, `${names[j]}: ${sum}`);
    });
    assert.ok(kilobytes < 4 * 2 ** 20, `peak of ${kilobytes} kB`);
  } finally {
    rmSync(folder, { recursive: true });
  }
});
