/**
 * The names of a session. Those that every cell has without an import lie under the user's own, which thus win. Plain
 * objects, since code of cells reads and writes them in its loops.
 */
export class Scope {
  /** Where cells set and find their names. */
  readonly names: Record<string, unknown>;

  /** @param given what cells have without an import */
  constructor(given: Readonly<Record<string, unknown>>) {
    this.names = Object.create(Object.assign(Object.create(null), given));
  }

  /** The value of a name that only the compiler uses, which is then forgotten. */
  take(name: string): unknown {
    const value = this.names[name];
    // Deleting the property would turn the object into a slow one.
    this.names[name] = undefined;
    return value;
  }
}
