import {
  type CheckupLine,
  dependenceLine,
  formLine,
  integrationLine,
  leverageLine,
  spreadLine,
  stabilityLine,
} from "./checkup/lines.js";
import { dependence } from "./dependence.js";
import { about, Diagnostic, type DiagnosticFields } from "./diagnostic.js";
import { form } from "./form.js";
import { leverage } from "./leverage.js";
import { holm } from "./parts/holm.js";
import { unitResiduals } from "./parts/residuals.js";
import { termAt } from "./parts/term-at.js";
import { counted, listed } from "./parts/words.js";
import { spread } from "./spread.js";
import { spuriousAlarm } from "./spurious.js";
import { stability } from "./stability.js";
import type { Fitted } from "./subject.js";

/** Options of `checkup`. */
export interface CheckupOptions {
  /** The coefficient that matters most; default the first term that is not the intercept. */
  readonly coefficient?: string;
  /** Seed of what is simulated; default 1. */
  readonly seed?: number;
  /** Draws of what is simulated; default 199. */
  readonly draws?: number;
}

interface CheckupFields extends DiagnosticFields {
  readonly coefficient: string;
  /**
   * One line per question: first those that remain after the adjustment, then other concerns, then the rest; within each, faults
   * of the mean (integration, stability, form) before those of the errors, which they can bring about.
   */
  readonly lines: readonly (CheckupLine & {
    /** Holm's adjusted p over the questions; NaN where a question is not decided by a test. */
    readonly adjusted: number;
  })[];
  /** How many tests were computed in all, and how many decide the questions. */
  readonly testsRun: number;
  readonly testsDeciding: number;
}

/** Whether a specification is sound: one line per question. */
export class Checkup extends Diagnostic implements CheckupFields {
  override readonly kind = "checkup";
  declare readonly coefficient: string;
  declare readonly lines: CheckupFields["lines"];
  declare readonly testsRun: number;
  declare readonly testsDeciding: number;

  constructor(fields: CheckupFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }
}

/**
 * Asks of `m` whether its errors depend on their past, are of one size, whether its terms enter in the right shape, its coefficients
 * hold throughout, it hangs on single periods, and whether it is a spurious fit between integrated series. Each question is
 * decided by one test that fits the model; over those Holm's adjustment holds the error rate of the whole. `tests` are the
 * tests of all parts. Throws an InputError for a perfect fit and for a coefficient that is not in the fit.
 */
export function checkup(m: Fitted, options: CheckupOptions = {}): Checkup {
  const r = m.regression;
  unitResiduals(r, "checkup");
  const at =
    options.coefficient === undefined
      ? Math.max(
          0,
          r.terms.findIndex((_, j) => j !== r.interceptAt),
        )
      : termAt(r.terms, options.coefficient, "checkup");
  const subject = { m, term: r.terms[at]!, at };
  const simulated = { seed: options.seed ?? 1, draws: options.draws ?? 199 };
  const parts = {
    dependence: dependence(m),
    spread: spread(m),
    form: form(m, simulated),
    stability: stability(m, simulated),
    leverage: leverage(m),
  };
  // faults of the mean come first: they pass for dependence and unevenness, while their own tests bear both
  const unranked = [
    integrationLine(subject, spuriousAlarm(r)),
    stabilityLine(subject, parts.stability),
    formLine(subject, parts.form),
    dependenceLine(subject, parts.dependence),
    spreadLine(subject, parts.spread),
    leverageLine(subject, parts.leverage),
  ];
  const adjusted = holm(unranked.map((line) => line.p));
  const alpha = 1 - m.level;
  const rank = (i: number) =>
    unranked[i]!.question === "integration" && unranked[i]!.concern
      ? 0
      : adjusted[i]! < alpha
        ? 1
        : unranked[i]!.concern
          ? 2
          : 3;
  const order = unranked.map((_, i) => i).sort((a, b) => rank(a) - rank(b) || a - b);
  const lines = order.map((i) => ({ ...unranked[i]!, adjusted: adjusted[i]! }));
  const tests = Object.values(parts).flatMap((part) => part.tests);
  const testsRun = tests.filter((test) => !Number.isNaN(test.p)).length;
  const testsDeciding = unranked.filter((line) => !Number.isNaN(line.p)).length;
  return new Checkup({
    ...about(m),
    seed: simulated.seed,
    coefficient: subject.term,
    lines,
    tests,
    testsRun,
    testsDeciding,
    finding: overall(lines, alpha, testsRun, testsDeciding),
    remarks: Object.values(parts)
      .flatMap((part) => part.remarks)
      .filter((remark) => remark.severity === "caution"),
  });
}

function overall(lines: CheckupFields["lines"], alpha: number, run: number, deciding: number): string {
  const firm = lines.filter(
    (line) => line.adjusted < alpha || (line.question === "integration" && line.concern),
  );
  const loose = lines.filter((line) => line.concern && !firm.includes(line));
  const count = `${counted(run, "test")} computed, ${deciding} of them decide; Holm's adjustment over these at ${Math.round(100 * alpha)} %`;
  const names = (some: typeof firm) => listed(some.map((line) => line.question));
  if (firm.length === 0 && loose.length === 0) return `Nothing found against the specification (${count}).`;
  if (firm.length === 0)
    return `Nothing holds up against the specification after the adjustment; ${names(loose)} would on ${loose.length === 1 ? "its" : "their"} own (${count}).`;
  const rest =
    loose.length === 0 ? "" : `; ${names(loose)} only on ${loose.length === 1 ? "its" : "their"} own`;
  return `Against the specification: ${names(firm)}${rest} (${count}).`;
}
