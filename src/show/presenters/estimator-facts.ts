import type { Fact } from "../card/card.js";
import { number } from "../text/figures.js";
import { name } from "../text/legible.js";

const labels: Readonly<Record<string, string>> = {
  s2: "Residual variance",
  df: "Degrees of freedom of the law",
  type: "Type",
  factor: "Small-sample factor",
  kernel: "Kernel",
  bandwidth: "Bandwidth",
  lags: "Lags",
  rule: "Bandwidth rule",
  law: "Critical values",
  b: "Bandwidth over periods, b",
  prewhitened: "Prewhitened",
  terms: "Terms",
  batches: "Batches",
  length: "Periods in a batch",
  errors: "Error process",
};
const perTerm = "rho: ";

/** The choices that an estimator made or found, as facts with their labels; those of single terms on one line. */
export function estimatorFacts(details: Readonly<Record<string, number | string | boolean | null>>): Fact[] {
  const facts: Fact[] = [];
  const rho: string[] = [];
  for (const [key, value] of Object.entries(details)) {
    if (key.startsWith(perTerm)) rho.push(`${name(key.slice(perTerm.length))} ${text(value)}`);
    else facts.push([labels[key] ?? key, text(value)]);
  }
  if (rho.length > 0) facts.push(["Autocorrelation of the scores", rho.join(", ")]);
  return facts;
}

function text(value: number | string | boolean | null): string {
  if (typeof value === "number") return number(value, 4);
  if (typeof value === "boolean") return value ? "yes" : "no";
  return value ?? "none";
}
