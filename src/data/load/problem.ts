import { InputError } from "../../numeric/index.js";

/** A cell or row that cannot be taken, said without its place; `load` adds file, row and line. */
export class RowProblem extends Error {
  constructor(
    /** 0-based data row. */
    readonly row: number,
    /** `column "fare"`, `time column "week"`, or empty when the whole row is meant. */
    readonly where: string,
    /** What is wrong and the way out. */
    readonly said: string,
    /** 1-based line of the file, where the reader knows it. */
    readonly line?: number,
  ) {
    super(said);
  }
}

/** The problem as it is told: `load: row 8 (line 9) of weeks.csv, column "fare": ...`. */
export function placed(problem: RowProblem, description: string, line = problem.line): InputError {
  const at = line === undefined ? "" : ` (line ${line})`;
  const where = problem.where === "" ? "" : `, ${problem.where}`;
  return new InputError(`load: row ${problem.row + 1}${at} of ${description}${where}: ${problem.said}`);
}
