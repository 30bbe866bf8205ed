/**
 * The names of a session. Those that every cell has without an import lie under the user's own, which thus win. Plain
 * objects, since code of cells reads and writes them in its loops.
 */
export class Scope {
  readonly #given: Record<string, unknown> = Object.create(null);
  readonly #own: Record<string, unknown> = Object.create(this.#given);
  #opened = false;

  /** Where a cell's names are set. */
  get names(): Record<string, unknown> {
    return this.#opened ? this.#own : this.#given;
  }

  /** What is named from now on is the user's. */
  open(): void {
    this.#opened = true;
  }

  /** The value of a name that only the compiler uses, which is then forgotten. */
  take(name: string): unknown {
    const value = this.names[name];
    // Deleting the property would turn the object into a slow one.
    this.names[name] = undefined;
    return value;
  }
}
