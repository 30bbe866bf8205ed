/** What a cell ends with when it is interrupted. */
export class Interrupted extends Error {
  override readonly name = "Interrupted";

  constructor() {
    super("the cell was interrupted");
  }
}

/** Whether an error says that a cell was interrupted, at an await or, by the interrupt signal, in synchronous code. */
export function isInterrupted(error: unknown): boolean {
  return (
    error instanceof Interrupted ||
    (error as NodeJS.ErrnoException | undefined)?.code === "ERR_SCRIPT_EXECUTION_INTERRUPTED"
  );
}

/** The wish to end one cell. */
export class Interruption {
  #requested = false;
  #due = false;
  #reject: ((error: Interrupted) => void) | undefined;

  /** Whether the cell is to end. */
  get requested(): boolean {
    return this.#requested;
  }

  /** Ends the wait of `orInterrupted`: the present one, or else the next. */
  request(): void {
    this.#requested = true;
    if (this.#reject) this.#reject(new Interrupted());
    else this.#due = true;
  }

  /** Waits for a value, unless an interruption is requested meanwhile. */
  async orInterrupted<V>(value: PromiseLike<V> | V): Promise<V> {
    const due = this.#due;
    this.#due = false;
    try {
      // Not a race against one lasting promise: a cell with a million awaits would leave it a million reactions.
      return await new Promise<V>((resolve, reject) => {
        this.#reject = reject;
        Promise.resolve(value).then(resolve, reject);
        if (due) reject(new Interrupted());
      });
    } finally {
      this.#reject = undefined;
    }
  }
}
