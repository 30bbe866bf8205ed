import { type KernelName, kernels } from "../../src/covariance/kernels.js";
import { kernelSum } from "../../src/covariance/sums/kernel-sum.js";
import type { Bench } from "./bench.js";
import { regressionData } from "./data.js";
import { duration, ratio, type Table } from "./table.js";
import { inTurns, seconds } from "./timing.js";

const T = 1_000_000;
const k = 10;
const asked: readonly (readonly [KernelName, number])[] = [
  ["bartlett", 10],
  ["bartlett", 100],
  ["bartlett", 1000],
  ["parzen", 100],
  ["quadratic spectral", 100],
];

/** Weighted sums of lagged products of the scores, as the covariance estimators form them, beside numpy. */
export async function benchHac({ folder, numpy }: Bench): Promise<Table> {
  const { X, u } = regressionData(T, k);
  await numpy?.give("X", X.data, [T, k], folder);
  await numpy?.give("u", u, [T], folder);
  const rows: string[][] = [];
  for (const [name, lags] of asked) {
    const kernel = { ...kernels[name], finite: true }; // the loops stop at the same lag
    const [own, loop, moving] = await inTurns(
      name === "bartlett" && lags === 1000 ? 1 : 3,
      // A new series each time, so that nothing is kept from the run before.
      () => seconds(() => kernelSum({ columns: X, multiplier: u }, kernel, lags + 1)),
      async () => (await numpy?.ask({ task: "lag_loop", kernel: name, lags }))?.seconds,
      async () =>
        name === "bartlett" ? (await numpy?.ask({ task: "moving_sums", lags }))?.seconds : undefined,
    );
    const beside = (time: number | undefined): string[] =>
      time === undefined ? ["–", "–"] : [duration(time), ratio(time, own!)];
    rows.push([`${kernels[name].title}, L = ${lags}`, duration(own!), ...beside(loop), ...beside(moving)]);
  }
  return {
    title: `Sums of lagged products of the scores, T = ${T}, k = ${k}`,
    heads: ["", "Lagbook", "numpy lag loop", "ratio", "numpy moving sums", "ratio"],
    rows,
  };
}
