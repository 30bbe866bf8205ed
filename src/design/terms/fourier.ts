import {
  parsePeriod,
  periodLabel,
  type Step,
  seasonLength,
  stepName,
  type TimeIndex,
} from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { calendarTerm, type Term, type TermColumn } from "../term.js";

/** Mean length of a year in weeks and days of the Gregorian calendar (400 years are 146,097 days). */
const yearIn: Partial<Record<Step["unit"], number>> = { week: 146_097 / 2_800, day: 146_097 / 400 };

/**
 * Waves: cos and sin of 2πjt/period for j = 1..n. The period, in steps, need not be whole; by default it is the year
 * for months, quarters, weeks and days, else the step's season. t counts steps from the period that holds 2000-01-01 (of
 * integers, from 0), whatever the table's span. At half the period the sine is zero throughout and is left out. Throws InputError for a step that has
 * no season, and for more waves than half the period.
 */
export function fourier(n: number, period?: number): Term {
  if (!Number.isInteger(n) || n < 1)
    throw new InputError(`fourier: the number of waves must be 1, 2, ..., not ${String(n)}.`);
  return calendarTerm(`fourier ${n}`, (index, ordinals) => {
    const { step } = index;
    const year = yearIn[step.unit];
    const length = period ?? (year === undefined ? seasonLength(step) : year / step.count);
    if (length === undefined)
      throw new InputError(`fourier: steps of one ${stepName(step)} have no season; give the period.`);
    if (!(length > 1 && Number.isFinite(length)))
      throw new InputError(`fourier: the period must be longer than one step, not ${String(length)}.`);
    if (n > length / 2)
      throw new InputError(`fourier: ${n} waves need a period of at least ${2 * n} steps, not ${length}.`);
    const origin = originOf(index);
    const note = `waves have t = 0 in ${periodLabel(index, origin)}`;
    const columns: TermColumn[] = [];
    for (let j = 1; j <= n; j++) {
      const label = `${2 * j}πt/${Number(length.toFixed(3))}`;
      // The whole turns are taken off first, where it is exact.
      const wave = (shape: (angle: number) => number) =>
        ordinals.map((ordinal) => shape((2 * Math.PI * ((j * (ordinal - origin)) % length)) / length));
      columns.push({ label: `cos ${label}`, values: wave(Math.cos), uses: [], note });
      if (2 * j !== length) columns.push({ label: `sin ${label}`, values: wave(Math.sin), uses: [], note });
    }
    return columns;
  });
}

// One origin for all tables, so that the waves of two samples are the same waves.
function originOf(index: TimeIndex): number {
  return index.step.unit === "integer" ? 0 : parsePeriod(index, "2000-01-01");
}
