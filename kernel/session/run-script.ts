import { Script } from "node:vm";
import { asyncSteps } from "./async-steps.js";
import type { Interruption } from "./interruption.js";

type Step = IteratorResult<unknown, void>;
const stepAt = Symbol.for("lagbook.step");
const stepScript = new Script(`globalThis[Symbol.for("lagbook.step")]()`, { filename: "lagbook-step.js" });
const heads = { plain: "(function", generator: "(function*" };

/**
 * Runs a compiled cell. A plain one runs to its end at once; the caller's watch over the interrupt signal covers it.
 * A generator is driven from one top-level await to the next, each stretch under a watch of its own, so that a loop
 * after an await can be stopped too.
 *
 * @param given what the cell's code finds by name: `exports`, `require`, ...
 */
export function runScript(
  compiled: { readonly script: string; readonly style: "plain" | "generator" },
  file: string,
  given: Readonly<Record<string, unknown>>,
  interruption: Interruption,
): unknown {
  (globalThis as Record<symbol, unknown>)[Symbol.for("lagbook.asyncSteps")] = asyncSteps;
  // The head stands on the script's own first line, so that lines in traces are the script's.
  const head = `${heads[compiled.style]}(${Object.keys(given).join(", ")}) {`;
  const script = new Script(`${head}${compiled.script}\n})`, { filename: file });
  const body = script.runInThisContext() as (...given: unknown[]) => unknown;
  const started = body(...Object.values(given));
  return compiled.style === "generator"
    ? drive(started as Generator<unknown, void, unknown>, interruption)
    : started;
}

async function drive(cell: Generator<unknown, void, unknown>, interruption: Interruption): Promise<void> {
  let step = watched(() => cell.next());
  while (!step.done) {
    const { value: awaited } = step;
    let resume: () => Step;
    try {
      const value = await interruption.orInterrupted(awaited);
      resume = () => cell.next(value);
    } catch (error) {
      if (interruption.requested) {
        await wayOut(cell, interruption);
        throw error;
      }
      resume = () => cell.throw(error);
    }
    step = watched(resume);
  }
}

/** Ends an interrupted cell at the await where it stands: its `finally` blocks run, nothing after them does. */
async function wayOut(cell: Generator<unknown, void, unknown>, interruption: Interruption): Promise<void> {
  let step = watched(() => cell.return());
  while (!step.done) {
    const value = await interruption.orInterrupted(step.value);
    step = watched(() => cell.next(value));
  }
}

/** Runs a stretch of code so that the interrupt signal ends it. */
export function watched<R>(code: () => R): R {
  (globalThis as Record<symbol, unknown>)[stepAt] = code;
  return stepScript.runInThisContext({ breakOnSigint: true }) as R;
}
