import { suggestion } from "../../data/index.js";
import { InputError, type Matrix, matrix } from "../../numeric/index.js";
import { dot } from "../shape/vectors.js";

/** Weights of a linear combination, by term: `{ fare: 1, "fare (t−1)": 1 }`. */
export type Weights = Readonly<Record<string, number>>;

/** A term that is zero, a combination that is zero, or one that equals a number. */
export type Restriction = string | Weights | { readonly weights: Weights; readonly equals?: number };

/** A restriction in figures. */
export interface ReadRestriction {
  /** `fare + fare (t−1) = 0`. */
  readonly text: string;
  readonly contrast: Float64Array;
  readonly equals: number;
}

/** Reads one restriction. @throws InputError for unknown terms, weights that are no numbers, and nothing but zeros. */
export function readRestriction(
  restriction: Restriction,
  terms: readonly string[],
  asked: string,
): ReadRestriction {
  const { weights, equals } = parts(restriction);
  if (!Number.isFinite(equals))
    throw new InputError(`${asked}: a combination is set equal to a number, not ${equals}.`);
  const contrast = readWeights(weights, terms, asked);
  return { text: `${combinationText(weights)} = ${written(equals)}`, contrast, equals };
}

function parts(restriction: Restriction): { weights: Weights; equals: number } {
  if (typeof restriction === "string") return { weights: { [restriction]: 1 }, equals: 0 };
  if (typeof restriction["weights"] === "object") {
    const given = restriction as { weights: Weights; equals?: number };
    return { weights: given.weights, equals: given.equals ?? 0 };
  }
  return { weights: restriction as Weights, equals: 0 };
}

/** Weights in the order of the terms. */
export function readWeights(weights: Weights, terms: readonly string[], asked: string): Float64Array {
  if (typeof weights !== "object" || weights === null) {
    throw new InputError(
      `${asked}: weights come by term, such as { ${JSON.stringify(terms[terms.length - 1])}: 1 }.`,
    );
  }
  const contrast = new Float64Array(terms.length);
  for (const [term, weight] of Object.entries(weights)) {
    const at = terms.indexOf(term);
    if (at < 0)
      throw new InputError(
        `${asked}: the fit has no term ${JSON.stringify(term)}.${suggestion(term, terms)}`,
      );
    if (typeof weight !== "number" || !Number.isFinite(weight)) {
      throw new InputError(
        `${asked}: the weight of ${JSON.stringify(term)} must be a number, not ${weight}.`,
      );
    }
    contrast[at] = weight;
  }
  if (contrast.every((weight) => weight === 0)) {
    throw new InputError(`${asked}: every weight is zero, which asks nothing. Give some term a weight.`);
  }
  return contrast;
}

/** `fare + 2 × fare (t−1) − rain`. */
export function combinationText(weights: Weights): string {
  const shown = Object.entries(weights).filter(([, weight]) => weight !== 0);
  return shown
    .map(([term, weight], i) => {
      const sign = weight < 0 ? (i === 0 ? "−" : "− ") : i === 0 ? "" : "+ ";
      const size = Math.abs(weight);
      return `${sign}${size === 1 ? "" : `${written(size)} × `}${term}`;
    })
    .join(" ");
}

const written = (x: number): string => String(x).replace("-", "−");

/**
 * The q×k matrix of restrictions.
 * @throws InputError when one follows from the others, naming it.
 */
export function restrictionMatrix(
  restrictions: readonly ReadRestriction[],
  k: number,
  asked: string,
): Matrix {
  const q = restrictions.length;
  const R = matrix(q, k);
  const basis: Float64Array[] = [];
  restrictions.forEach(({ contrast, text }, i) => {
    for (let j = 0; j < k; j++) R.data[j * q + i] = contrast[j]!;
    const rest = Float64Array.from(contrast);
    const before = dot(rest, rest);
    for (let pass = 0; pass < 2; pass++) {
      for (const b of basis) {
        const along = dot(b, rest);
        for (let j = 0; j < k; j++) rest[j]! -= along * b[j]!;
      }
    }
    const after = dot(rest, rest);
    if (!(after > 1e-20 * before)) {
      throw new InputError(
        `${asked}: "${text}" follows from the restrictions before it, or contradicts them. Leave it out.`,
      );
    }
    const length = Math.sqrt(after);
    basis.push(rest.map((value) => value / length));
  });
  return R;
}
