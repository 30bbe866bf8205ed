/** A MIME bundle: what a notebook is sent to show a value. */
export type MimeBundle = Record<string, unknown>;

/** The open convention of JavaScript notebook runtimes: a method that returns a MIME bundle or a promise of one. */
export const displaySymbol = Symbol.for("Jupyter.display");

/** Something the reader of a card must know: said on the card, in the record and in the plain text. */
export interface Remark {
  /** `note`: a fact about how the numbers came about; `caution`: a reason to trust them less. */
  readonly severity: "note" | "caution";
  readonly text: string;
}

type Presenter = (result: never) => MimeBundle | Promise<MimeBundle>;
const presenters = new Map<string, Presenter>();

/**
 * Says how results of one kind are shown. Rooms that compute know nothing of pictures, so the room that draws
 * (`show`) registers its presenters here when it is loaded.
 */
export function presentWith<R extends Result>(
  kind: R["kind"],
  present: (result: R) => MimeBundle | Promise<MimeBundle>,
): void {
  presenters.set(kind, present as Presenter);
}

/** Base of every value that Lagbook shows: immutable, with a kind, a JSON record and a MIME bundle. */
export abstract class Result {
  abstract readonly kind: string;

  /** The machine-readable record: every shown number at full precision (missing numbers as null). */
  abstract toJSON(): Record<string, unknown>;

  [displaySymbol](): MimeBundle | Promise<MimeBundle> {
    const present = presenters.get(this.kind);
    if (present) return present(this as never);
    return { "text/plain": JSON.stringify(this.toJSON(), null, 2) };
  }
}
