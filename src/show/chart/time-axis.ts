import { periodDate, type Step } from "../../data/index.js";

/** How periods stand on a horizontal axis. */
export interface TimeScale {
  /** The value of a period on the axis: milliseconds since 1970 in UTC, or the whole number that it is. */
  readonly at: (ordinal: number) => number;
  /** The encoding of the axis for a field that holds such values. */
  readonly encoding: (field: string, ticks?: number) => Record<string, unknown>;
}

/** The horizontal axis for a step: time in UTC, whatever zone the viewer is in; plain numbers for whole numbers. */
export function timeScale(step: Step): TimeScale {
  if (step.unit === "integer") {
    return {
      at: (ordinal) => ordinal * step.count + (step.offset ?? 0),
      encoding: (field, ticks = 8) => ({
        field,
        type: "quantitative",
        title: null,
        scale: { zero: false, nice: false },
        axis: { format: "d", tickMinStep: 1, grid: false, tickCount: ticks },
      }),
    };
  }
  return {
    at: (ordinal) => periodDate(step, ordinal).getTime(),
    encoding: (field, ticks = 8) => ({
      field,
      type: "temporal",
      title: null,
      scale: { type: "utc", nice: false },
      axis: { grid: false, labelOverlap: true, tickCount: ticks },
    }),
  };
}
