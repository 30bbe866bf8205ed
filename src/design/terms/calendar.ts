import {
  parsePeriod,
  parsePeriodEnd,
  periodLabel,
  type Step,
  seasonLength,
  seasonOf,
  stepName,
} from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { makeTerm, type Term, type TermColumn } from "../term.js";

/**
 * Time itself: 1 in the table's first period, then one more each step, gaps counted; up to a power (`trend(2)` gives
 * trend and trend²).
 */
export function trend(degree = 1): Term {
  if (!Number.isInteger(degree) || degree < 1 || degree > 10) {
    throw new InputError(`trend: the degree must be a whole number from 1 to 10, not ${degree}.`);
  }
  return makeTerm("trend", ({ index }) => {
    const start = index.ordinals[0]!;
    return Array.from({ length: degree }, (_, i): TermColumn => {
      const label = i === 0 ? "trend" : `trend${superscript(i + 1)}`;
      return { label, values: index.ordinals.map((ordinal) => (ordinal - start + 1) ** (i + 1)), uses: [] };
    });
  });
}

function superscript(n: number): string {
  return [...String(n)].map((digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(digit)]).join("");
}

/** Options of `seasonal`. */
export interface SeasonalOptions {
  /**
   * `"base"` (default): each season against the first one. `"sum-to-zero"`: each season against the mean of all
   * seasons, the last being minus the sum of the others. `"all"`: one column per season, for a fit with no intercept.
   */
  readonly contrast?: "base" | "sum-to-zero" | "all";
}

/** A level for each season of the table's step: months of the year, quarters, weeks, days of the week, hours. */
export function seasonal(options: SeasonalOptions = {}): Term {
  const { contrast = "base" } = options;
  if (!["base", "sum-to-zero", "all"].includes(contrast)) {
    throw new InputError(
      `seasonal: contrast ${JSON.stringify(contrast)} is none of "base", "sum-to-zero", "all".`,
    );
  }
  return makeTerm("seasonal", ({ index }) => {
    const length = seasonLength(index.step);
    if (length === undefined) {
      throw new InputError(
        `seasonal: steps of one ${stepName(index.step)} have no season; use fourier(n, period).`,
      );
    }
    const seasons = index.ordinals.map((ordinal) => seasonOf(index.step, ordinal, index.zone));
    const name = (season: number) => seasonName(index.step, season);
    const note =
      contrast === "base"
        ? { note: `seasons are measured against ${name(0)}` }
        : contrast === "sum-to-zero"
          ? {
              note: `seasons are measured against their mean; ${name(length - 1)} is minus the sum of the others`,
            }
          : {};
    const chosen = Array.from({ length }, (_, season) => season).slice(
      contrast === "base" ? 1 : 0,
      contrast === "sum-to-zero" ? length - 1 : length,
    );
    return chosen.map(
      (season): TermColumn => ({
        label: name(season),
        values: seasons.map((present) =>
          present === season ? 1 : contrast === "sum-to-zero" && present === length - 1 ? -1 : 0,
        ),
        uses: [],
        ...note,
      }),
    );
  });
}

const days = ["Monday", "Tuesday", "Wednesday", "Thursday", "Friday", "Saturday", "Sunday"];
const months = [
  "January",
  "February",
  "March",
  "April",
  "May",
  "June",
  "July",
  "August",
  "September",
  "October",
  "November",
  "December",
];

function seasonName(step: Step, season: number): string {
  if (step.count === 1) {
    if (step.unit === "month") return months[season]!;
    if (step.unit === "day" || step.unit === "business-day") return days[season]!;
    if (step.unit === "quarter") return `Q${season + 1}`;
    if (step.unit === "half-year") return `H${season + 1}`;
    if (step.unit === "week") return `W${String(season + 1).padStart(2, "0")}`;
    if (step.unit === "hour") return `hour ${String(season).padStart(2, "0")}`;
  }
  return `season ${season + 1}`;
}

/** Mean length of a year in weeks and days of the Gregorian calendar (400 years are 146,097 days). */
const yearIn: Partial<Record<Step["unit"], number>> = { week: 146_097 / 2_800, day: 146_097 / 400 };

/**
 * Waves of a season: cos and sin of 2πjt/period for j = 1..n. The period in steps defaults to the year for months,
 * quarters, weeks and days, else to the step's season; it need not be whole. t counts from the step's fixed origin.
 */
export function fourier(n: number, period?: number): Term {
  if (!Number.isInteger(n) || n < 1)
    throw new InputError(`fourier: the number of waves must be 1, 2, ..., not ${n}.`);
  return makeTerm(`fourier ${n}`, ({ index }) => {
    const { step } = index;
    const length = period ?? (yearIn[step.unit] ? yearIn[step.unit]! / step.count : seasonLength(step));
    if (length === undefined)
      throw new InputError(`fourier: steps of one ${stepName(step)} have no season; give the period.`);
    if (!(length > 1))
      throw new InputError(`fourier: the period must be longer than one step, not ${length}.`);
    if (n > length / 2)
      throw new InputError(`fourier: ${n} waves need a period of at least ${2 * n} steps, not ${length}.`);
    const columns: TermColumn[] = [];
    for (let j = 1; j <= n; j++) {
      const angle = (ordinal: number) => (2 * Math.PI * ((j * ordinal) % length)) / length;
      columns.push({
        label: `cos ${j}/season`,
        values: index.ordinals.map((o) => Math.cos(angle(o))),
        uses: [],
      });
      // At half the period the sine is zero throughout.
      if (2 * j !== length) {
        columns.push({
          label: `sin ${j}/season`,
          values: index.ordinals.map((o) => Math.sin(angle(o))),
          uses: [],
        });
      }
    }
    return columns;
  });
}

type Axis = Parameters<typeof parsePeriod>[0];

function dated(
  asked: string,
  label: (at: string) => string,
  at: string | number,
  value: (distance: number) => number,
): Term {
  return makeTerm(label(String(at)), ({ index }) => {
    const ordinal = parseFor(asked, index, at);
    const name = label(periodLabel(index, ordinal));
    const values = index.ordinals.map((present) => value(present - ordinal));
    const flat = values.every((x) => x === values[0]);
    if (flat) {
      const span = `${periodLabel(index, index.ordinals[0]!)} to ${periodLabel(index, index.ordinals[index.ordinals.length - 1]!)}`;
      throw new InputError(`${asked}: "${name}" does not vary over the table, which spans ${span}.`);
    }
    return [{ label: name, values, uses: [] }];
  });
}

function parseFor(asked: string, axis: Axis, at: string | number, parse = parsePeriod): number {
  try {
    return parse(axis, at);
  } catch (error) {
    throw new InputError(`${asked}: ${(error as Error).message}.`);
  }
}

/** 0 before a period, 1 from it on. */
export function step(at: string | number): Term {
  return dated(
    "step",
    (name) => `from ${name}`,
    at,
    (distance) => (distance >= 0 ? 1 : 0),
  );
}

/** 1 in one period, 0 in all others. */
export function pulse(at: string | number): Term {
  return dated(
    "pulse",
    (name) => `in ${name}`,
    at,
    (distance) => (distance === 0 ? 1 : 0),
  );
}

/** 0 before a period, then 1, 2, 3, ... from it on. */
export function ramp(at: string | number): Term {
  return dated(
    "ramp",
    (name) => `since ${name}`,
    at,
    (distance) => Math.max(0, distance + 1),
  );
}

/** 1 from one period to another, both included, 0 outside. */
export function between(from: string | number, to: string | number): Term {
  return makeTerm(`${from} to ${to}`, ({ index }) => {
    const first = parseFor("between", index, from);
    const last = parseFor("between", index, to, parsePeriodEnd);
    if (last < first) throw new InputError(`between: ${to} comes before ${from}.`);
    const label = `${periodLabel(index, first)} to ${periodLabel(index, last)}`;
    const values = index.ordinals.map((present) => (present >= first && present <= last ? 1 : 0));
    return [{ label, values, uses: [] }];
  });
}
