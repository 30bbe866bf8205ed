import { InputError } from "../numeric/index.js";
import type { TermColumn } from "./term.js";

/** The label of the constant. */
export const interceptLabel = "intercept";

/** Refuses an outcome that is not one series, no terms at all, and names that clash. */
export function checkNames(
  left: readonly TermColumn[],
  right: readonly TermColumn[],
  intercept: boolean,
): void {
  if (left.length !== 1) throw new InputError(`fit: the outcome must be one series, not ${left.length}.`);
  if (right.length === 0 && !intercept) throw new InputError("fit: there are no terms and no intercept.");
  const seen = new Set<string>();
  for (const { label } of right) {
    const name = JSON.stringify(label);
    if (label === left[0]!.label)
      throw new InputError(
        `fit: the outcome ${name} is also among the terms. Leave it out, or take a lag of it.`,
      );
    if (intercept && label === interceptLabel) {
      throw new InputError(
        `fit: the term ${name} would have the name of the fit's own constant. Rename it with .rename({ ${name}: ... }), or say intercept: false.`,
      );
    }
    if (seen.has(label))
      throw new InputError(`fit: the term ${name} is given twice. Leave one out, or rename it.`);
    seen.add(label);
  }
}
