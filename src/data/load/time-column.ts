import { InputError } from "../../numeric/index.js";
import type { Remark } from "../result.js";
import { isClockUnit, ordinalOfInstant, startOfPeriod } from "../time/calendar.js";
import { instantOfWall, type WrittenForm } from "../time/forms.js";
import { inferStep, parseStep } from "../time/infer.js";
import { type Step, stepName } from "../time/step.js";
import { type TimeIndex, validZone } from "../time/time-index.js";
import { zoneClock } from "../time/zone.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn } from "./raw-table.js";
import { readWrittenTimes } from "./written-times.js";

/** The time column on both clocks: `instants` in UTC, `walls` as written or in the stated zone. */
export interface Times {
  readonly form: WrittenForm;
  readonly instants: Float64Array;
  readonly walls: Float64Array;
  /** Whether the source said how far its clock was from UTC. */
  readonly offset: boolean;
}

/** Makes the time index of the time column, its step inferred or as stated, and says what was taken for granted. */
export function readTimeColumn(
  time: RawColumn,
  options: LoadOptions,
): { index: TimeIndex; walls: Float64Array; findings: Remark[] } {
  if (options.zone !== undefined) validZone(options.zone);
  const where = `time column ${JSON.stringify(time.name)}`;
  const times = time.kind === "instant" ? heldTimes(time, where, options) : readWrittenTimes(time, options);
  const step =
    options.every === undefined
      ? inferredStep(times, time.name)
      : statedStep(options.every, times.form, time.name);
  const stands = isClockUnit(step.unit) ? times.instants : times.walls;
  const ordinals = stands.map((at) => ordinalOfInstant(step, at));
  requireWeekdays(step, times.walls, where);
  const zone = options.zone ? { zone: options.zone } : {};
  return {
    index: { step, name: time.name, ordinals, ...zone },
    walls: times.walls,
    findings: takenForGranted(step, times, options),
  };
}

function heldTimes(time: RawColumn & { kind: "instant" }, where: string, options: LoadOptions): Times {
  const { values, form } = time;
  const blank = values.findIndex((value) => Number.isNaN(value));
  if (blank >= 0) throw new RowProblem(blank, where, "there is no time. Every row needs a period.");
  if (form === "date") return { form, instants: values, walls: values, offset: false };
  if (time.offset) {
    if (!options.zone) return { form, instants: values, walls: time.walls ?? values, offset: true };
    const clock = zoneClock(options.zone);
    return { form, instants: values, walls: values.map((at) => clock.wallOf(at)), offset: true };
  }
  return { form, ...onZone(values, where, options), offset: false };
}

/** Wall times as instants of the stated zone (UTC without one). */
export function onZone(
  walls: Float64Array,
  where: string,
  options: LoadOptions,
): { instants: Float64Array; walls: Float64Array } {
  const { zone, repeatedHour } = options;
  if (!zone) return { instants: walls, walls };
  const clock = zoneClock(zone);
  const seen = new Set<number>();
  const instants = walls.map((wall, row) => {
    const candidates = clock.instantsOf(wall);
    if (candidates.length === 2 && repeatedHour === "in order") {
      const again = seen.has(wall);
      seen.add(wall);
      return candidates[again ? 1 : 0]!;
    }
    const instant = instantOfWall(wall, zone, repeatedHour);
    if (typeof instant === "number") return instant;
    throw new RowProblem(row, where, `${wallText(wall)}: ${instant}.`);
  });
  return { instants, walls };
}

/** A wall time as ISO 8601 writes it, seconds left out when they are zero. */
export function wallText(wall: number): string {
  return new Date(wall)
    .toISOString()
    .replace("T", " ")
    .replace(/(:00)?(\.000)?Z$/, "");
}

function statedStep(every: string | Step, form: WrittenForm, name: string): Step {
  const step = parseStep(every);
  const finer: Partial<Record<WrittenForm, readonly Step["unit"][]>> = {
    year: ["year"],
    "half-year": ["year", "half-year"],
    quarter: ["year", "half-year", "quarter"],
    month: ["year", "half-year", "quarter", "month"],
    week: ["week"],
    integer: ["integer"],
  };
  const allowed = finer[form];
  if (allowed ? !allowed.includes(step.unit) : step.unit === "integer") {
    throw new InputError(
      `load: the time column ${JSON.stringify(name)} is written as ${form}, which does not fit every: "${stepName(step)}".`,
    );
  }
  return step;
}

function inferredStep(times: Times, name: string): Step {
  const order = sortedTogether(times.instants, times.walls);
  const step = inferStep(order.instants, order.walls, times.form);
  if (step) return step;
  throw new InputError(
    `load: one period does not tell the step of ${JSON.stringify(name)}; state it, as in every: "month".`,
  );
}

/** Both clocks in ascending order of the instants; not a copy when they are so already. */
function sortedTogether(
  instants: Float64Array,
  walls: Float64Array,
): { instants: Float64Array; walls: Float64Array } {
  let ascending = true;
  for (let i = 1; i < instants.length && ascending; i++) ascending = instants[i]! >= instants[i - 1]!;
  if (ascending) return { instants, walls };
  if (instants === walls) {
    const sorted = Float64Array.from(instants).sort();
    return { instants: sorted, walls: sorted };
  }
  const rows = Array.from(instants.keys()).sort((a, b) => instants[a]! - instants[b]!);
  return {
    instants: Float64Array.from(rows, (row) => instants[row]!),
    walls: Float64Array.from(rows, (row) => walls[row]!),
  };
}

function requireWeekdays(step: Step, walls: Float64Array, where: string): void {
  if (step.unit !== "business-day") return;
  for (let row = 0; row < walls.length; row++) {
    const weekday = new Date(walls[row]!).getUTCDay();
    if (weekday !== 0 && weekday !== 6) continue;
    const name = weekday === 0 ? "Sunday" : "Saturday";
    throw new RowProblem(row, where, `${wallText(walls[row]!).slice(0, 10)} is a ${name}, no business day.`);
  }
}

function takenForGranted(step: Step, times: Times, options: LoadOptions): Remark[] {
  const findings: Remark[] = [];
  const say = (text: string) => findings.push({ severity: "note", text });
  const dated = times.form === "date" || times.form === "day-month" || times.form === "month-day";
  if (step.unit === "week" && dated) say("each date stands for the ISO week that it falls in");
  if (dated && step.unit !== "day" && step.unit !== "business-day" && step.unit !== "week") {
    const dates = new Set(Array.from(times.walls.subarray(0, 1000), (wall) => new Date(wall).getUTCDate()));
    if (!(dates.size === 1 && dates.has(1))) say(`each date stands for the ${step.unit} that it falls in`);
  }
  if (isClockUnit(step.unit)) {
    const inside = times.instants.find((at) => startOfPeriod(step, ordinalOfInstant(step, at)) !== at);
    if (inside !== undefined) say(`each time stands for the ${stepName(step)} that it falls in`);
  }
  if (times.form === "date-time" && !times.offset && !options.zone) {
    say("times carry no offset and were read as UTC");
  }
  return findings;
}
