import { InputError } from "../../numeric/index.js";
import type { Column } from "../column.js";
import { requireRegular } from "../regular.js";
import type { TimeTable } from "../table.js";
import { parseStep } from "../time/infer.js";
import { coarsePeriodOf, finePeriodsIn, meanLength } from "../time/nesting.js";
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
  if (meanLength(step) <= meanLength(index.step) || step.unit === "business-day") {
    throw new InputError(
      `to: ${stepName(step)} is not coarser than this table's step, ${stepName(index.step)}.`,
    );
  }
  const groups = new Map<number, number[]>();
  index.ordinals.forEach((ordinal, row) => {
    const coarse = coarsePeriodOf(index, step, ordinal)!;
    const list = groups.get(coarse);
    if (list) list.push(row);
    else groups.set(coarse, [row]);
  });
  const axis = { step };
  let left = 0;
  for (const [coarse, rows] of groups) {
    const expected = finePeriodsIn(index, step, coarse);
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
    aggregated(table, name, aggregate, coarse, groups, axis),
  );
  const ways = Object.entries(aggregates).map(
    ([name, aggregate]) => `${name} by ${aggregate.name || "own function"}`,
  );
  const dropped = table.names.filter((name) => !(name in aggregates));
  const straddles = step.unit !== "week" && (index.step.unit === "week" || index.step.count > 1);
  const notes = [
    straddles ? `each ${stepName(index.step)} counts to the ${stepName(step)} in which it starts` : "",
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

function aggregated(
  table: TimeTable,
  name: string,
  aggregate: Aggregate,
  coarse: readonly number[],
  groups: ReadonlyMap<number, number[]>,
  axis: { readonly step: Step },
): Column {
  const values = table.numbers(name);
  const { filled } = table.column(name);
  const result = Float64Array.from(coarse, (ordinal) => {
    const value = aggregate(Float64Array.from(groups.get(ordinal)!, (row) => values[row]!));
    if (typeof value === "number" && Math.abs(value) !== Number.POSITIVE_INFINITY) return value;
    throw new InputError(
      `to: the function for ${JSON.stringify(name)} gives ${String(value)} in ${periodLabel(axis, ordinal)}, which is no finite number.`,
    );
  });
  if (!filled) return { name, kind: "number", values: result };
  const flags = Uint8Array.from(coarse, (ordinal) =>
    groups.get(ordinal)!.some((row) => filled[row]) ? 1 : 0,
  );
  return { name, kind: "number", values: result, filled: flags };
}
