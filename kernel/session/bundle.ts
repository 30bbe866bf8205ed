import { inspect } from "node:util";
import { displaySymbol } from "../../src/data/index.js";
import type { Bundle } from "./output.js";

/**
 * The MIME bundle of a value: its own, by the open convention `Symbol.for("Jupyter.display")` (a method that returns a
 * bundle or a promise of one), else its inspected text. A bundle that cannot be made is said in the text.
 */
export async function bundleOf(value: unknown): Promise<Bundle> {
  const method = ownMethod(value);
  if (!method) return { "text/plain": text(value) };
  try {
    const bundle = await method.call(value);
    if (typeof bundle === "object" && bundle !== null) return bundle as Bundle;
    return { "text/plain": text(value) };
  } catch (error) {
    const reason = error instanceof Error ? `${error.name}: ${error.message}` : String(error);
    return { "text/plain": `${text(value)}\n(its display failed: ${reason})` };
  }
}

function ownMethod(value: unknown): ((this: unknown) => unknown) | undefined {
  if (value === null || (typeof value !== "object" && typeof value !== "function")) return undefined;
  try {
    const method = (value as Record<symbol, unknown>)[displaySymbol];
    return typeof method === "function" ? (method as (this: unknown) => unknown) : undefined;
  } catch {
    return undefined;
  }
}

function text(value: unknown): string {
  try {
    return inspect(value, { depth: 4, maxArrayLength: 100, maxStringLength: 10_000, breakLength: 100 });
  } catch (error) {
    return `(a value that cannot be shown: ${(error as Error).message})`;
  }
}
