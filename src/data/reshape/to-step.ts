import { InputError } from "../../numeric/index.js";
import type { Column } from "../column.js";
import { requireRegular } from "../regular.js";
import type { TimeTable } from "../table.js";
import { ordinalOfInstant, startOfPeriod } from "../time/calendar.js";
import { parseStep } from "../time/infer.js";
import { type Step, stepName } from "../time/step.js";
import { periodLabel } from "../time/time-index.js";
import type { Aggregate } from "./aggregates.js";
import { derive } from "./derive.js";

/** What becomes of each column: `{ fare: mean, riders: sum }`. Columns not named are left out, and that is recorded. */
export type Aggregates = Readonly<Record<string, Aggregate>>;

/** Options of `to`. */
export interface StepOptions {
  /** `true` keeps coarse periods that are only partly covered by rows. Refused without it, `"leave out"` drops them. */
  readonly parts?: boolean | "leave out";
}

/** The same series at a coarser step. A fine period counts to the coarse one in which it starts. */
export function toStep(
  table: TimeTable,
  to: string | Step,
  aggregates: Aggregates,
  options: StepOptions = {},
): TimeTable {
  requireRegular(table.index, "to");
  const step = parseStep(to);
  const { index } = table;
  if (index.step.unit === "integer" || step.unit === "integer") {
    throw new InputError("to: whole-number periods have no calendar to aggregate by.");
  }
  const groups = new Map<number, number[]>();
  index.ordinals.forEach((ordinal, row) => {
    const coarse = ordinalOfInstant(step, startOfPeriod(index.step, ordinal));
    const list = groups.get(coarse);
    if (list) list.push(row);
    else groups.set(coarse, [row]);
  });
  const axis = { step };
  const coarser = averageLength(step) > averageLength(index.step);
  if (!coarser) {
    throw new InputError(
      `to: ${stepName(step)} is not coarser than this table's step, ${stepName(index.step)}.`,
    );
  }
  let left = 0;
  for (const [coarse, rows] of groups) {
    const expected = finePeriods(index.step, step, coarse);
    if (rows.length === expected || options.parts === true) continue;
    if (options.parts !== "leave out") {
      throw new InputError(
        `to: ${periodLabel(axis, coarse)} is only partly covered (${rows.length} of ${expected} periods of one ` +
          `${stepName(index.step)}). Say { parts: "leave out" }, { parts: true } to aggregate what is there, or fill first.`,
      );
    }
    groups.delete(coarse);
    left++;
  }
  const coarse = [...groups.keys()].sort((a, b) => a - b);
  if (coarse.length === 0) throw new InputError(`to: no ${stepName(step)} is fully covered.`);
  const columns = Object.entries(aggregates).map(([name, aggregate]) =>
    aggregated(table, name, aggregate, coarse, groups),
  );
  const ways = Object.entries(aggregates).map(
    ([name, aggregate]) => `${name} by ${aggregate.name || "own function"}`,
  );
  const dropped = table.names.filter((name) => !(name in aggregates));
  const notes = [
    dropped.length > 0 ? `left out: ${dropped.join(", ")}` : "",
    left > 0 ? `${left} part periods left out` : "",
    options.parts === true ? "part periods aggregated as they are" : "",
  ].filter(Boolean);
  return derive(table, [`to ${stepName(step)}: ${ways.join(", ")}`, ...notes].join("; "), {
    index: {
      step,
      name: index.name,
      ordinals: Float64Array.from(coarse),
      ...(index.zone ? { zone: index.zone } : {}),
    },
    columns,
  });
}

function averageLength(step: Step): number {
  return (startOfPeriod(step, 400) - startOfPeriod(step, 0)) / 400;
}

/** How many fine periods start within one coarse period. */
function finePeriods(fine: Step, coarse: Step, ordinal: number): number {
  const at = (instant: number) => {
    const inside = ordinalOfInstant(fine, instant);
    return startOfPeriod(fine, inside) === instant ? inside : inside + 1;
  };
  return at(startOfPeriod(coarse, ordinal + 1)) - at(startOfPeriod(coarse, ordinal));
}

function aggregated(
  table: TimeTable,
  name: string,
  aggregate: Aggregate,
  coarse: readonly number[],
  groups: ReadonlyMap<number, number[]>,
): Column {
  const values = table.numbers(name);
  const { filled } = table.column(name);
  const result = Float64Array.from(coarse, (ordinal) =>
    aggregate(Float64Array.from(groups.get(ordinal)!, (row) => values[row]!)),
  );
  if (!filled) return { name, kind: "number", values: result };
  const flags = Uint8Array.from(coarse, (ordinal) =>
    groups.get(ordinal)!.some((row) => filled[row]) ? 1 : 0,
  );
  return { name, kind: "number", values: result, filled: flags };
}
