/** A label, and how it was put together, so that another operator on top is written without ambiguity. */
export interface Labelled {
  /** As the trade writes it: `fare (t−1)`. */
  readonly label: string;
  /**
   * What the label is a writing of: something moved in time by `by` steps (positive: a lag), or several parts that
   * another operator takes together in brackets. Absent for a name, which is never parsed.
   */
  readonly form?: { readonly of: Labelled; readonly by: number } | "product" | "multiple" | undefined;
}

const minus = "\u2212";

/** The label of something `by` steps earlier (negative: later). A move of a move is one move. */
export function movedLabel(what: Labelled, by: number): Labelled {
  const moved = typeof what.form === "object" ? what.form : undefined;
  const of = moved?.of ?? what;
  const total = (moved?.by ?? 0) + by;
  if (total === 0) return { label: of.label, form: of.form };
  const inner = of.form === "product" ? `(${of.label})` : of.label;
  return { label: `${inner} (t${total > 0 ? minus : "+"}${Math.abs(total)})`, form: { of, by: total } };
}

/** The label of an operator on something: `log fare`, `Δ log fare`, `log (fare × rain)`; of a lag, `log fare (t−1)`. */
export function operatorLabel(operator: string, what: Labelled): Labelled {
  return inTime(what, (inner) => {
    const brackets = inner.form === "product" || inner.form === "multiple";
    return { label: `${operator} ${brackets ? `(${inner.label})` : inner.label}`, form: undefined };
  });
}

/** The label of a multiple: `100 × fare`. */
export function multipleLabel(factor: number, what: Labelled): Labelled {
  return inTime(what, (inner) => ({ label: `${written(factor)} × ${inner.label}`, form: "multiple" }));
}

/** The label of a product: `fare × rain`, `fare²`. */
export function productLabel(a: Labelled, b: Labelled): Labelled {
  if (a.label === b.label && a.form === undefined) return { label: `${a.label}²`, form: undefined };
  return { label: `${a.label} × ${b.label}`, form: "product" };
}

/** A number as text, with a true minus sign. */
export function written(value: number): string {
  return String(value).replace("-", minus);
}

/** A whole number in superscript: `²`. */
export function superscript(n: number): string {
  return [...String(n)].map((digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(digit)]).join("");
}

/** A whole number in subscript: `₁₂`. */
export function subscript(n: number): string {
  return [...String(n)].map((digit) => "₀₁₂₃₄₅₆₇₈₉"[Number(digit)]).join("");
}

// What an operator makes of a lag is the lag of what it makes: both are written with the move last.
function inTime(what: Labelled, write: (inner: Labelled) => Labelled): Labelled {
  return typeof what.form === "object" ? movedLabel(write(what.form.of), what.form.by) : write(what);
}
