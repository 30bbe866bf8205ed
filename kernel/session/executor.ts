import { createRequire } from "node:module";
import type { Converter } from "./compiler/converter.js";

type Executor = import("tslab/dist/executor.js").Executor;
const require = createRequire(import.meta.url);
const callAt = Symbol.for("lagbook.call");

/**
 * tslab's executor, which runs synchronous code under a watch over the interrupt signal. It is handed calls of cells that
 * have been compiled before, in the place of their source.
 */
export class CellExecutor {
  readonly #executor: Executor;
  #awaits = false;
  #thrown: { readonly error: unknown } | undefined;

  constructor(directory: string, converter: Converter) {
    const { createExecutor } = require("tslab/dist/executor.js") as typeof import("tslab/dist/executor.js");
    const calling = Object.assign(Object.create(converter), {
      convert: () => ({
        output: `return globalThis[Symbol.for("lagbook.call")]();`,
        hasToplevelAwait: this.#awaits,
        diagnostics: [],
      }),
    });
    this.#executor = createExecutor(
      directory,
      { node: calling, browser: calling, close: () => {} },
      {
        log: () => {},
        error: (error: unknown) => {
          this.#thrown = { error };
        },
      },
    );
  }

  /** Calls, and if `awaits` waits for what is returned. @returns what was thrown, if anything was */
  async run(call: () => unknown, awaits: boolean): Promise<{ readonly error: unknown } | undefined> {
    (globalThis as Record<symbol, unknown>)[callAt] = call;
    this.#awaits = awaits;
    this.#thrown = undefined;
    await this.#executor.execute("cell");
    return this.#thrown;
  }

  close(): void {
    this.#executor.close();
  }
}
