import { columnOf, type Matrix, movingSumProducts } from "../../numeric/index.js";
import type { Series } from "./series.js";

/** Σ_j (1 − |j|/m)⁺ Σ_t v_t v'_{t−j} for a whole bandwidth m, in one pass whatever m is. */
export function bartlettSum({ columns, multiplier }: Series, m: number): Matrix {
  return movingSumProducts(
    { columns: Array.from({ length: columns.columns }, (_, j) => columnOf(columns, j)), multiplier },
    m,
  );
}
