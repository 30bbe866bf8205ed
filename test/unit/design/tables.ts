import { load, type TimeTable } from "../../../src/data/index.js";
import { columnsOf, type TermColumn, type TermLike } from "../../../src/design/index.js";

const labels = Array.from({ length: 10 }, (_, i) => `2024-W${String(i + 1).padStart(2, "0")}`);

/** Ten weeks: x = 1, 2, 5, 10, ..., 82; group b, a, a, b, ...; flag true in every second week. */
export const weeks = (): Promise<TimeTable> =>
  load(
    labels.map((week, i) => ({ week, x: i * i + 1, group: i % 3 === 0 ? "b" : "a", flag: i % 2 === 0 })),
    { time: "week" },
  );

/** Weeks 1 to 10 without weeks 4 and 5: x = 0, 1, 2, 5, 6, 7, 8, 9. */
export const gappedWeeks = (): Promise<TimeTable> =>
  load(
    labels.flatMap((week, i) => (i === 3 || i === 4 ? [] : [{ week, x: i }])),
    { time: "week" },
  );

/** Quarters from 2020Q1 on, x = 0, 1, 2, ... */
export const quarters = (T: number): Promise<TimeTable> =>
  load(
    Array.from({ length: T }, (_, i) => ({ q: `${2020 + Math.floor(i / 4)}Q${(i % 4) + 1}`, x: i })),
    { time: "q" },
  );

/** The first column of a term. */
export const only = (term: TermLike, table: TimeTable): TermColumn => columnsOf(term, table)[0]!;

/** The values of the first column of a term. */
export const values = (term: TermLike, table: TimeTable): number[] => [...only(term, table).values];

/** The labels of all columns of a term. */
export const names = (term: TermLike, table: TimeTable): string[] =>
  columnsOf(term, table).map(({ label }) => label);
