import { bundleOf } from "./bundle.js";
import { currentCell } from "./cell-context.js";

/** What `display` returns: the same place in the notebook, to be written anew. It shows nothing itself. */
export class Shown {
  readonly #show: (value: unknown) => Promise<void>;

  /** Made by `display`. */
  constructor(show: (value: unknown) => Promise<void>) {
    this.#show = show;
  }

  /** Shows another value in the same place. */
  update(value: unknown): Promise<void> {
    return this.#show(value);
  }
}

/**
 * Shows a value where the cell stands, before it ends: a card, a chart, anything that has a MIME bundle, or its text.
 * With an `id`, a later `display` of the same id replaces it.
 */
export async function display(value: unknown, options: { readonly id?: string } = {}): Promise<Shown> {
  const cell = currentCell("display");
  const id = options.id ?? cell.nextDisplayId();
  const again = cell.shown.has(id);
  cell.shown.add(id);
  const show = async (next: unknown, type: "display_data" | "update_display_data") => {
    cell.emit({ type, data: await bundleOf(next), metadata: {}, transient: { display_id: id } });
  };
  await show(value, again ? "update_display_data" : "display_data");
  return new Shown((next) => show(next, "update_display_data"));
}

/** Empties the cell's output, at once or (`wait`) when the next output comes. */
export function clearOutput(options: { readonly wait?: boolean } = {}): void {
  currentCell("clearOutput").emit({ type: "clear_output", wait: options.wait ?? false });
}

/** Asks the person at the notebook for a line of text and waits for it; `hidden` hides what is typed. */
export function ask(question: string, options: { readonly hidden?: boolean } = {}): string {
  return currentCell("ask").ask(question, options.hidden ?? false);
}
