import { parsePeriod, parsePeriodEnd, periodLabel, type TimeIndex } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { calendarTerm, type Term } from "../term.js";

type Period = string | number;

/**
 * 0 before a period, 1 from it on: `step("2021-W30")`. The period is written as the table writes it, or as any date
 * within it. Throws InputError for what cannot be read as one, and for one that leaves the column without variation.
 */
export function step(at: Period): Term {
  return dated(
    "step",
    at,
    (name) => `from ${name}`,
    (distance) => (distance >= 0 ? 1 : 0),
  );
}

/** 1 in one period, 0 in all others. Throws as `step` does. */
export function pulse(at: Period): Term {
  return dated(
    "pulse",
    at,
    (name) => `in ${name}`,
    (distance) => (distance === 0 ? 1 : 0),
  );
}

/** 0 before a period, then 1, 2, 3, ... from it on. Throws as `step` does. */
export function ramp(at: Period): Term {
  return dated(
    "ramp",
    at,
    (name) => `since ${name}`,
    (distance) => Math.max(0, distance + 1),
  );
}

/** 1 from one period to another, both included, 0 outside. `between(2020, 2021)` of months is all of both years. */
export function between(from: Period, to: Period): Term {
  return calendarTerm(`${from} to ${to}`, (index, ordinals) => {
    const first = read("between", index, from);
    const last = read("between", index, to, parsePeriodEnd);
    if (last < first) throw new InputError(`between: ${to} comes before ${from}.`);
    const label = `${periodLabel(index, first)} to ${periodLabel(index, last)}`;
    const shape = (at: number) => (at >= first && at <= last ? 1 : 0);
    refuseFlat("between", index, label, shape);
    return [{ label, values: ordinals.map(shape), uses: [] }];
  });
}

function dated(
  asked: string,
  at: Period,
  label: (name: string) => string,
  shape: (distance: number) => number,
): Term {
  return calendarTerm(label(String(at)), (index, ordinals) => {
    const origin = read(asked, index, at);
    const name = label(periodLabel(index, origin));
    refuseFlat(asked, index, name, (ordinal) => shape(ordinal - origin));
    return [{ label: name, values: ordinals.map((ordinal) => shape(ordinal - origin)), uses: [] }];
  });
}

function refuseFlat(
  asked: string,
  index: TimeIndex,
  label: string,
  shape: (ordinal: number) => number,
): void {
  const { ordinals } = index;
  const first = shape(ordinals[0]!);
  if (ordinals.some((ordinal) => shape(ordinal) !== first)) return;
  const span = `${periodLabel(index, ordinals[0]!)} to ${periodLabel(index, ordinals[ordinals.length - 1]!)}`;
  throw new InputError(`${asked}: "${label}" does not vary over the table, which spans ${span}.`);
}

function read(asked: string, index: TimeIndex, at: Period, parse = parsePeriod): number {
  if (typeof at !== "string" && typeof at !== "number") {
    throw new InputError(
      `${asked}: give a period, such as ${asked}("${periodLabel(index, index.ordinals[0]!)}").`,
    );
  }
  try {
    return parse(index, at);
  } catch (error) {
    if (error instanceof InputError) throw new InputError(`${asked}: ${error.message}.`);
    throw error;
  }
}
