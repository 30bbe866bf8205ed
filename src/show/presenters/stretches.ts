import { periodLabel, type Stretch, type TimeIndex } from "../../data/index.js";
import { count } from "../text/figures.js";

/** Stretches of periods in words: `2022-W14; 2022-W30 to 2022-W31; and 3 more`. */
export function stretchesText(index: TimeIndex, stretches: readonly Stretch[], shown = 2): string {
  const label = (ordinal: number) => periodLabel(index, ordinal);
  const said = stretches
    .slice(0, shown)
    .map(({ first, last }) => (first === last ? label(first) : `${label(first)} to ${label(last)}`));
  if (stretches.length > shown) said.push(`and ${count(stretches.length - shown)} more`);
  return said.join("; ");
}
