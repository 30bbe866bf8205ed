import { columnOf, type Matrix, type RankDeficient } from "../numeric/index.js";

/** What is said of terms that depend on one another: which, and the combination that reproduces the first. */
export function dependenceMessage(error: RankDeficient, X: Matrix, terms: readonly string[]): string {
  const target = error.dependent[0]!;
  const parts = error.combination[0]!;
  const name = JSON.stringify(terms[target]);
  const column = columnOf(X, target);
  if (parts.length === 0) return `fit: ${name} is zero in every period used. Leave it out.`;
  if (column.every((value) => value === column[0])) {
    return `fit: ${name} is constant (${column[0]}) over the periods used and cannot be told from the intercept. Leave it out, or say intercept: false.`;
  }
  if (parts.length === 1 && terms[parts[0]!.column] === "intercept") {
    return `fit: ${name} hardly varies against its size and cannot be told from the intercept. Measure it from another origin, or leave it out.`;
  }
  const written = parts.map(({ column, weight }, i) => {
    const size = Math.abs(weight);
    const factor = Math.abs(size - 1) < 1e-9 ? "" : `${Number(size.toPrecision(6))} × `;
    const sign = weight < 0 ? "\u2212 " : i === 0 ? "" : "+ ";
    return `${sign}${factor}${JSON.stringify(terms[column])}`;
  });
  const others = error.dependent.slice(1, 4).map((j) => JSON.stringify(terms[j]));
  const more = error.dependent.length > 4 ? `, and ${error.dependent.length - 4} more` : "";
  const also = others.length > 0 ? ` The same holds of ${others.join(", ")}${more}.` : "";
  return `fit: the terms depend on one another: ${name} = ${written.join(" ")} in every period used.${also} Leave one of them out${others.length > 0 ? " for each" : ""}.`;
}
