import { type Step, seasonLength, seasonOf, stepName, type TimeIndex } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { requireOptions } from "../resolve.js";
import { calendarTerm, type Term, type TermColumn } from "../term.js";

const contrasts = ["base", "sum-to-zero", "all"] as const;

/** Options of `seasonal`. */
export interface SeasonalOptions {
  /**
   * `"base"` (default): each season against the first one. `"sum-to-zero"`: each season against the mean of all
   * seasons, the last being minus the sum of the others. `"all"`: one column per season, for a fit with no intercept.
   */
  readonly contrast?: (typeof contrasts)[number];
}

/**
 * A level for each season of the table's step: months of the year, quarters, weeks, days of the week, hours. Week 53
 * counts with week 52. Throws InputError for a step that has no season.
 */
export function seasonal(options: SeasonalOptions = {}): Term {
  requireOptions("seasonal", options, ["contrast"]);
  const { contrast = "base" } = options;
  if (!contrasts.includes(contrast)) {
    throw new InputError(
      `seasonal: contrast ${JSON.stringify(contrast)} is none of "base", "sum-to-zero", "all".`,
    );
  }
  return calendarTerm("seasonal", (index, ordinals) => {
    const { step, zone } = index;
    const length = seasonLength(step);
    if (length === undefined) {
      throw new InputError(
        `seasonal: steps of one ${stepName(step)} have no season; use fourier(n, period).`,
      );
    }
    const seasons = ordinals.map((ordinal) => seasonOf(step, ordinal, zone));
    const last = length - 1;
    const note = noteOn(contrast, index, ordinals, length);
    const column = (season: number): TermColumn => ({
      label: seasonName(step, season),
      values: seasons.map((at) => (at === season ? 1 : contrast === "sum-to-zero" && at === last ? -1 : 0)),
      uses: [],
      ...(note ? { note } : {}),
      whenZero: "Use fourier(n), or a sample that has every season.",
    });
    const chosen = Array.from({ length }, (_, season) => season);
    return chosen.slice(contrast === "base" ? 1 : 0, contrast === "sum-to-zero" ? last : length).map(column);
  });
}

function noteOn(
  contrast: SeasonalOptions["contrast"],
  { step }: TimeIndex,
  ordinals: Float64Array,
  length: number,
): string {
  const said: string[] = [];
  if (contrast === "base") said.push(`seasons are measured against ${seasonName(step, 0)}`);
  if (contrast === "sum-to-zero") {
    said.push(
      `seasons are measured against their mean; ${seasonName(step, length - 1)} is minus the sum of the others`,
    );
  }
  if (step.unit === "week" && step.count === 1 && hasLongYear(step, ordinals))
    said.push("week 53 counts with week 52");
  return said.join("; ");
}

// Two neighbouring weeks of one season: only a year of 53 weeks has them.
function hasLongYear(step: Step, ordinals: Float64Array): boolean {
  return ordinals.some((at) => seasonOf(step, at) === 51 && seasonOf(step, at - 1) === 51);
}

const days = ["Monday", "Tuesday", "Wednesday", "Thursday", "Friday", "Saturday", "Sunday"];
// biome-ignore format: twelve names
const months = ["January", "February", "March", "April", "May", "June", "July", "August", "September", "October", "November", "December"];

function seasonName(step: Step, season: number): string {
  if (step.count === 1 && !step.offset) {
    if (step.unit === "month") return months[season]!;
    if (step.unit === "day" || step.unit === "business-day") return days[season]!;
    if (step.unit === "quarter") return `Q${season + 1}`;
    if (step.unit === "half-year") return `H${season + 1}`;
    if (step.unit === "week") return `W${String(season + 1).padStart(2, "0")}`;
    if (step.unit === "hour") return `hour ${String(season).padStart(2, "0")}`;
  }
  return `season ${season + 1}`;
}
