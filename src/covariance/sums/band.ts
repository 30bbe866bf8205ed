import { columnOf, laggedProducts, type Matrix } from "../../numeric/index.js";
import type { Series } from "./series.js";

/** Σ_j κ_j Σ_t v_t v'_{t−j} over |j| ≤ last for a few lags, by filtering each column once. */
export function bandSum({ columns, multiplier }: Series, weights: Float64Array): Matrix {
  return laggedProducts(
    { columns: Array.from({ length: columns.columns }, (_, j) => columnOf(columns, j)), multiplier },
    weights,
  );
}
