import { InputError } from "../../numeric/index.js";
import { productLabel } from "../label.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { combined } from "./combine.js";

/** The product of two or more terms, each column of one with each of the others: `product("fare", step("2021-W30"))`. */
export function product(a: TermLike, b: TermLike, ...more: readonly TermLike[]): Term {
  if (b === undefined) throw new InputError("product: give two terms or more.");
  const [next, ...rest] = more;
  if (next !== undefined) return product(product(a, b), next, ...rest);
  return makeTerm(productLabel(labelOf(a), labelOf(b)), (table, back) => {
    const right = columnsOf(b, table, back);
    return columnsOf(a, table, back).flatMap((left) =>
      right.map((other): TermColumn => {
        const notes = [...new Set([left.note, other.note])].filter((note) => note !== undefined);
        return {
          ...productLabel(left, other),
          ...combined(left, other, (x, y) => x * y),
          ...(notes.length > 0 ? { note: notes.join("; ") } : {}),
        };
      }),
    );
  });
}
