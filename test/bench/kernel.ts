import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { root } from "../root.js";
import { KernelClient } from "../support/kernel-client.js";
import { pythonWith } from "./numpy.js";
import { duration, ratio, type Table } from "./table.js";
import { median, seconds } from "./timing.js";

const starts = 5;
const trips = 30;

interface Times {
  readonly reply: number;
  readonly result: number;
  readonly trip: number;
}

/** From the kernel's start to its first reply and to its first result, and a warm `1+1`, beside ipykernel. */
export async function benchKernel(): Promise<Table> {
  const own: Times[] = [];
  for (let i = 0; i < starts; i++) own.push(await once());
  const theirs = ipykernel();
  const row = (name: string, of: (times: Times) => number): string[] => {
    const mine = median(own.map(of));
    const other = theirs && median(theirs.map(of));
    return [name, duration(mine), ...(other ? [duration(other), ratio(other, mine)] : ["–", "–"])];
  };
  return {
    title: `Kernel, median of ${starts} starts`,
    heads: ["", "Lagbook", "ipykernel", "ratio"],
    rows: [
      row("start to the first kernel_info reply", ({ reply }) => reply),
      row("start to the first result of 1+1", ({ result }) => result),
      row(`warm 1+1, median of ${trips}`, ({ trip }) => trip),
    ],
    notes: theirs ? [] : ["no ipykernel found: npm test sets it up"],
  };
}

async function once(): Promise<Times> {
  const began = performance.now();
  const client = await KernelClient.start();
  const since = (): number => (performance.now() - began) / 1000;
  try {
    await client.request("kernel_info_request", {});
    const reply = since();
    await client.run("1+1");
    const result = since();
    const times: number[] = [];
    for (let i = 0; i < trips; i++) times.push(await seconds(() => client.run("1+1")));
    return { reply, result, trip: median(times) };
  } finally {
    await client.close();
  }
}

function ipykernel(): Times[] | undefined {
  const python = pythonWith("ipykernel, jupyter_client");
  if (!python) return undefined;
  const args = [join(root, "test", "bench", "ipykernel_side.py"), String(starts), String(trips)];
  const { stdout, status } = spawnSync(python, args, {
    encoding: "utf8",
    stdio: ["ignore", "pipe", "inherit"],
  });
  if (status !== 0) throw new Error(`bench: the ipykernel side ended with ${status}`);
  return JSON.parse(stdout) as Times[];
}
