import { periodLabel } from "../data/index.js";
import type { Fit } from "./fit.js";

const number = (value: number) => (Number.isFinite(value) ? value : null);

/** The machine-readable record of a fit: every number at full precision, missing ones as null. */
export function fitRecord(m: Fit): Record<string, unknown> {
  return {
    kind: m.kind,
    specification: m.specification,
    T: m.T,
    k: m.k,
    level: m.level,
    estimator: { kind: m.estimator.kind, options: m.estimator.options, ...estimatorFacts(m) },
    coefficients: m.coefficients.map((row) => ({
      term: row.term,
      estimate: row.estimate,
      se: number(row.se),
      statistic: number(row.statistic),
      low: number(row.low),
      high: number(row.high),
      p: number(row.p),
    })),
    rss: m.rss,
    s2: number(m.s2),
    rSquared: { value: number(m.rSquared.value), about: m.rSquared.about },
    logLikelihood: number(m.logLikelihood),
    aic: number(m.aic),
    bic: number(m.bic),
    condition: number(m.regression.condition),
    left: m.design.left.map(({ ordinal, reason }) => ({
      period: periodLabel(m.design.index, ordinal),
      reason,
    })),
    remarks: m.remarks,
    provenance: m.table.provenance,
    fingerprint: m.fingerprint,
  };
}

function estimatorFacts(m: Fit): Record<string, unknown> {
  if (m.perfect) return { label: m.estimator.label };
  return { label: m.covariance.label, details: m.covariance.details };
}
