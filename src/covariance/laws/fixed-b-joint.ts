import type { Matrix } from "../../numeric/index.js";
import type { Scores } from "../scores.js";
import { type FixedB, fixedBForm, shownB } from "./fixed-b.js";
import { drawsOnDesign, restrictedWeights } from "./joint-design.js";
import { drawsInLimit } from "./joint-limit.js";
import { mixtureLaw, type SimulatedJointLaw } from "./mixture.js";

/**
 * The fixed-b law of a Wald statistic of q restrictions: W = z'S⁻¹z, where z is standard normal and S, the kernel estimate
 * of its variance, is independent of it; so W = R/D with R ~ χ²_q and D = 1/(d'S⁻¹d) for the direction d of z. S is drawn
 * with iid normal errors, on the design at hand or in the limit by the same rule as for one contrast.
 */
export function fixedBJointLaw(scores: Scores, restrictions: Matrix, choice: FixedB): SimulatedJointLaw {
  const q = restrictions.rows;
  const b = choice.bandwidth / scores.span;
  const own = contrasts(restrictions).every((c) => fixedBForm(scores, c, choice.limit) === "own design");
  const count = own ? Math.max(4000, Math.min(12_000, Math.floor(3e6 / scores.span))) : 16_000;
  let sample: Float64Array | undefined;
  const draws = (): Float64Array => {
    sample ??= own
      ? drawsOnDesign(scores, restrictedWeights(scores, restrictions), choice, count)
      : drawsInLimit(choice.kernel, b, q, count);
    return sample;
  };
  const where = own ? "on this design" : "in the limit";
  return mixtureLaw(`fixed-b, b = ${shownB(b)}, q = ${q}, ${where}, ${count} draws`, q, draws);
}

function contrasts(restrictions: Matrix): Float64Array[] {
  const { rows: q, columns: k } = restrictions;
  return Array.from({ length: q }, (_, i) =>
    Float64Array.from({ length: k }, (_, j) => restrictions.data[j * q + i]!),
  );
}
