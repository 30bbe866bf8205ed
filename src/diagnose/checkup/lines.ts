import { white } from "../../covariance/index.js";
import type { Dependence } from "../dependence.js";
import type { Form } from "../form.js";
import type { Leverage } from "../leverage.js";
import { figure, pValue } from "../parts/words.js";
import type { Spread } from "../spread.js";
import type { Spurious } from "../spurious.js";
import type { Stability } from "../stability.js";
import type { Fitted } from "../subject.js";
import { fitCall, outcomeCode } from "./code.js";

/** One question of a checkup. */
export interface CheckupLine {
  readonly question: "dependence" | "spread" | "form" | "stability" | "leverage" | "integration";
  /** Whether it gives reason to doubt the specification, before the adjustment for asking several questions. */
  readonly concern: boolean;
  readonly finding: string;
  /** The figure that decides it, in words; and its p-value, NaN where the question is not decided by one. */
  readonly figure: string;
  readonly p: number;
  /** What it means for the coefficient of interest. */
  readonly matters: string;
  /** A call to run next, where there is reason to. */
  readonly attempt?: string;
}

/** What the calls are about: the names that a call would use. */
export interface Subject {
  readonly m: Fitted;
  /** The coefficient of interest and its place among the terms. */
  readonly term: string;
  readonly at: number;
}

export function dependenceLine({ m, term }: Subject, found: Dependence): CheckupLine {
  const inflation = found.inflation.factors.find((f) => f.term === term)?.factor;
  const matters = m.regression.laggedOutcome
    ? found.dependent
      ? `${term} itself is biased: lagged outcomes and dependent errors do not go together`
      : `no sign that ${term} is biased`
    : inflation === undefined
      ? "not known"
      : `standard error of ${term} ${figure(Math.sqrt(inflation), 2)} times that under independent errors`;
  const next = found.decisive?.note?.includes("alone") ? found.decisive.lags : 2;
  return {
    question: "dependence",
    concern: found.dependent,
    finding: found.finding,
    figure: found.decisive ? `${found.decisive.name} ${pValue(found.p)}` : "not tested",
    p: found.p,
    matters,
    ...(found.dependent
      ? {
          attempt: m.regression.laggedOutcome
            ? fitCall(m, [`lag(${outcomeCode(m)}, ${next})`])
            : `covariances(m, undefined, { terms: [${JSON.stringify(term)}] })`,
        }
      : {}),
  };
}

export function spreadLine({ m, term, at }: Subject, found: Spread): CheckupLine {
  const r = m.regression;
  const classical = Math.sqrt((r.rss / (r.T - r.k)) * r.gramInverse.data[at * r.k + at]!);
  const robust = Math.sqrt(white("HC1").on(r).matrix.data[at * r.k + at]!);
  return {
    question: "spread",
    concern: found.uneven,
    finding: found.finding,
    figure: found.decisive ? `${found.decisive.name} ${pValue(found.p)}` : "not tested",
    p: found.p,
    matters: `standard error of ${term} ${figure(robust / classical, 2)} times that under an even spread`,
    ...(found.uneven ? { attempt: found.dependent ? "m.under(neweyWest())" : 'm.under(white("HC3"))' } : {}),
  };
}

export function formLine({ m }: Subject, found: Form): CheckupLine {
  const plain = found.named("RESET").at(-1);
  const [q, rest] = plain?.df ?? [];
  const share = plain && q && rest ? (plain.statistic * q) / (plain.statistic * q + rest) : Number.NaN;
  const bend = found.partialResiduals[0]?.term;
  return {
    question: "form",
    concern: found.bent,
    finding: found.finding,
    figure: found.decisive ? `${found.decisive.name} ${pValue(found.decisive.p)}` : "not tested",
    p: found.decisive?.p ?? Number.NaN,
    matters: Number.isNaN(share)
      ? "not known"
      : `powers of the fitted values take up ${figure(100 * share, 2)} % of the residual variance of ${m.outcome}`,
    ...(found.bent && bend ? { attempt: "form(m).partialResiduals" } : {}),
  };
}

export function stabilityLine({ m, term, at }: Subject, found: Stability): CheckupLine {
  const values = found.regimes.map((part) => part.coefficients[at]!).filter((b) => !Number.isNaN(b));
  const date = found.breaks[0]?.label ?? "";
  return {
    question: "stability",
    concern: found.unstable,
    finding: found.finding,
    figure: found.decisive ? `${found.decisive.name} ${pValue(found.decisive.p)}` : "not tested",
    p: found.decisive?.p ?? Number.NaN,
    matters:
      values.length > 1
        ? `${term} is ${values.map((b) => figure(b)).join(", then ")}`
        : `no change of ${term} to report`,
    ...(found.unstable && date
      ? {
          attempt: fitCall(m, [`step(${JSON.stringify(date)})`]),
        }
      : {}),
  };
}

export function leverageLine({ term, at }: Subject, found: Leverage): CheckupLine {
  const [outlier] = found.tests;
  const furthest = found.blocks.reduce<Leverage["blocks"][number] | undefined>(
    (far, block) => (Math.abs(block.moves[at]!) > Math.abs(far?.moves[at] ?? 0) ? block : far),
    undefined,
  );
  const move = furthest ? Math.abs(furthest.moves[at]!) : Number.NaN;
  const concern = move > 1 || outlier!.p < 1 - found.level;
  return {
    question: "leverage",
    concern,
    finding: found.finding,
    figure: Number.isNaN(outlier!.p) ? "not tested" : `largest residual ${pValue(outlier!.p)}`,
    p: outlier!.p,
    matters: furthest
      ? `${term} moves by ${figure(move, 2)} standard errors without ${furthest.label}`
      : "no block can be left out",
    ...(concern && furthest ? { attempt: `leverage(m, { block: ${found.blockLength} }).blocks` } : {}),
  };
}

export function integrationLine({ m, term }: Subject, alarm: Spurious | undefined): CheckupLine {
  return {
    question: "integration",
    concern: alarm !== undefined,
    finding: alarm
      ? alarm.remark.text
      : m.regression.laggedOutcome
        ? "Lagged outcomes are among the terms, so a unit root of the residuals is not looked for."
        : "No sign that the fit is a spurious one between integrated series.",
    figure: alarm
      ? `Durbin–Watson ${figure(alarm.durbinWatson)}, R² ${figure(alarm.rSquared)}`
      : "alarm silent",
    p: Number.NaN,
    matters: alarm
      ? `${term} and its interval may mean nothing`
      : `no reason to doubt ${term} on this ground`,
    ...(alarm ? { attempt: `integration(table, ${outcomeCode(m)})` } : {}),
  };
}
