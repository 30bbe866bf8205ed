import type { Fitted } from "../subject.js";

/**
 * How a cell would write the term of that label: the name of a column in quotes, or `log(...)`, `lag(..., n)`, `lead(..., n)`,
 * `step(...)` of such. Nothing for labels of any other form.
 */
export function codeOf(label: string, isColumn: (name: string) => boolean): string | undefined {
  if (isColumn(label)) return JSON.stringify(label);
  const shifted = /^(.*) \(t([\u2212+])(\d+)\)$/.exec(label);
  if (shifted) {
    const inner = codeOf(shifted[1]!, isColumn);
    return inner && `${shifted[2] === "+" ? "lead" : "lag"}(${inner}, ${shifted[3]})`;
  }
  const log = /^log (.*)$/.exec(label);
  if (log) {
    const inner = codeOf(log[1]!, isColumn);
    return inner && `log(${inner})`;
  }
  const step = /^from (\S+)$/.exec(label);
  return step ? `step(${JSON.stringify(step[1])})` : undefined;
}

/** The outcome as a cell would write it; `outcome` where its label does not tell. */
export function outcomeCode(m: Fitted): string {
  return codeOf(m.outcome, isColumnOf(m)) ?? "outcome";
}

/**
 * A call of `fit` with the same outcome and terms, with terms added and options. Terms whose labels do not tell how they were made
 * leave the whole list as `terms`.
 */
export function fitCall(m: Fitted, added: readonly string[], options?: string): string {
  const { terms, interceptAt } = m.regression;
  const known = terms.filter((_, j) => j !== interceptAt).map((label) => codeOf(label, isColumnOf(m)));
  const list = known.every((code) => code !== undefined)
    ? `[${[...known, ...added].join(", ")}]`
    : added.length > 0
      ? `[...terms, ${added.join(", ")}]`
      : "terms";
  return `fit(table, ${outcomeCode(m)}, ${list}${options ? `, ${options}` : ""})`;
}

function isColumnOf(m: Fitted): (name: string) => boolean {
  return (name) => (m.table ? m.table.has(name) : /^[\w ]+$/.test(name) && !/^(log|from) /.test(name));
}
