import { solveLeastSquares } from "../../src/numeric/index.js";
import type { Bench } from "./bench.js";
import { regressionData } from "./data.js";
import { duration, ratio, type Table } from "./table.js";
import { inTurns, seconds } from "./timing.js";

const T = 1_000_000;
const k = 10;

/** Least squares of a million rows on ten columns, refined to the last bit, beside numpy's lstsq. */
export async function benchFit({ folder, numpy }: Bench): Promise<Table> {
  const { X, y } = regressionData(T, k);
  await numpy?.give("X", X.data, [T, k], folder);
  await numpy?.give("y", y, [T], folder);
  let ours: ArrayLike<number> = [];
  const [own, theirs] = await inTurns(
    7,
    () => seconds(() => (ours = solveLeastSquares(X, y).coefficients)),
    async () => (await numpy?.ask({ task: "lstsq" }))?.seconds,
  );
  const other = (await numpy?.ask({ task: "lstsq" }))?.value;
  const apart = other?.map((value, j) => Math.abs(value - ours[j]!));
  return {
    title: `Fit of T = ${T}, k = ${k}: coefficients, residuals, (X'X)⁻¹`,
    heads: ["", "Lagbook", "numpy lstsq", "ratio"],
    rows: [
      [
        "refined to the last bit",
        duration(own!),
        theirs ? duration(theirs) : "–",
        theirs ? ratio(theirs, own!) : "–",
      ],
    ],
    notes: apart ? [`largest difference of a coefficient ${Math.max(...apart).toExponential(1)}`] : [],
  };
}
