import { Script } from "node:vm";

type Step = () => IteratorResult<unknown, void>;
const stepAt = Symbol.for("lagbook.step");
const stepScript = new Script(`globalThis[Symbol.for("lagbook.step")]()`, { filename: "lagbook-step.js" });

/**
 * Runs a compiled cell. A plain one runs to its end at once; the caller's watch over the interrupt signal covers it.
 * A generator is driven from one top-level await to the next, each stretch under a watch of its own, so that a loop
 * after an await can be stopped too.
 */
export function runScript(
  compiled: { readonly script: string; readonly style: "plain" | "generator" | "async" },
  file: string,
  exports: Record<string, unknown>,
  require: (specifier: string) => unknown,
): unknown {
  const heads = { plain: "(function", generator: "(function*", async: "(async function" };
  // The head stands on the script's own first line, so that lines in traces are the script's.
  const script = new Script(`${heads[compiled.style]}(exports, require) {${compiled.script}\n})`, {
    filename: file,
  });
  const body = script.runInThisContext() as (exports: unknown, require: unknown) => unknown;
  const started = body(exports, require);
  return compiled.style === "generator" ? drive(started as Generator<unknown, void, unknown>) : started;
}

async function drive(cell: Generator<unknown, void, unknown>): Promise<void> {
  let next = watched(() => cell.next());
  while (!next.done) {
    let value: unknown;
    try {
      value = await next.value;
    } catch (error) {
      next = watched(() => cell.throw(error));
      continue;
    }
    next = watched(() => cell.next(value));
  }
}

function watched(step: Step): IteratorResult<unknown, void> {
  (globalThis as Record<symbol, unknown>)[stepAt] = step;
  return stepScript.runInThisContext({ breakOnSigint: true }) as IteratorResult<unknown, void>;
}
