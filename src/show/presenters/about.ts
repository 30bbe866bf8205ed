import { count } from "../text/figures.js";

/** What results about a fit carry of it. */
interface AboutFit {
  readonly T?: number;
  readonly k?: number;
  readonly span?: string;
  readonly fingerprint?: string;
}

/** Headline facts of the fit that a result is about. */
export function aboutFacts(about: Record<string, unknown>): string[] {
  const { T, k, span } = about as AboutFit;
  return [
    ...(span === undefined ? [] : [span]),
    ...(T === undefined ? [] : [`${count(T)} periods`]),
    ...(k === undefined ? [] : [`${count(k)} ${k === 1 ? "coefficient" : "coefficients"}`]),
  ];
}

/** The fingerprint of the data, for a card's footer. */
export function aboutPrint(about: Record<string, unknown>): { fingerprint?: string } {
  const { fingerprint } = about as AboutFit;
  return fingerprint === undefined ? {} : { fingerprint };
}
