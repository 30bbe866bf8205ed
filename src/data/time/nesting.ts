import { isClockUnit, ordinalOfInstant, startOfPeriod } from "./calendar.js";
import type { Step } from "./step.js";
import { type TimeIndex, wallStart } from "./time-index.js";
import { zoneClock } from "./zone.js";

type Axis = Pick<TimeIndex, "step" | "zone">;

/**
 * The coarse period in which a fine one starts, on the clock of the fine axis's zone; undefined for a weekend among
 * business days.
 */
export function coarsePeriodOf(fine: Axis, coarse: Step, ordinal: number): number | undefined {
  const start = isClockUnit(coarse.unit) ? startOfPeriod(fine.step, ordinal) : wallStart(fine, ordinal);
  if (coarse.unit === "business-day") {
    const weekday = new Date(start).getUTCDay();
    if (weekday === 0 || weekday === 6) return undefined;
  }
  return ordinalOfInstant(coarse, start);
}

/** How many periods of the fine axis start within one coarse period: 23, 24 or 25 hours in a day. */
export function finePeriodsIn(fine: Axis, coarse: Step, ordinal: number): number {
  return firstFrom(fine, coarse, ordinal + 1) - firstFrom(fine, coarse, ordinal);
}

/** The first fine ordinal that starts at or after the start of a coarse period. */
function firstFrom(fine: Axis, coarse: Step, ordinal: number): number {
  const start = startOfPeriod(coarse, ordinal);
  const onClock = isClockUnit(fine.step.unit) && !isClockUnit(coarse.unit);
  const instant = fine.zone && onClock ? instantOf(fine.zone, start) : start;
  const inside = ordinalOfInstant(fine.step, instant);
  return startOfPeriod(fine.step, inside) >= instant ? inside : inside + 1;
}

/** The instant of a wall time; of a midnight that the clock skips, the moment after the skip. */
function instantOf(zone: string, wall: number): number {
  const clock = zoneClock(zone);
  const [first] = clock.instantsOf(wall);
  if (first !== undefined) return first;
  const before = wall - 86_400_000;
  return wall - (clock.wallOf(before) - before);
}

/** Mean length of a period in days, to tell coarse steps from fine ones; business days count as days. */
export function meanLength(step: Step): number {
  if (step.unit === "business-day") return step.count;
  return (startOfPeriod(step, 400) - startOfPeriod(step, 0)) / 400 / 86_400_000;
}
