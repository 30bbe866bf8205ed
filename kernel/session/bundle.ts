import { inspect } from "node:util";
import { displaySymbol } from "../../src/data/index.js";
import { isInterrupted } from "./interruption.js";
import type { Bundle } from "./output.js";

/**
 * The MIME bundle of a value: its own, by the open convention `Symbol.for("Jupyter.display")` (a method that returns a
 * bundle or a promise of one), else its inspected text. A bundle that cannot be made or sent is said in the text.
 *
 * @param call calls the method; a session does so under a watch for interrupts
 */
export async function bundleOf(
  value: unknown,
  call: <R>(code: () => R) => R = (code) => code(),
): Promise<Bundle> {
  const method = ownMethod(value);
  if (!method) return { "text/plain": inspected(value) };
  try {
    const bundle = await call(() => method.call(value));
    if (typeof bundle !== "object" || bundle === null) return { "text/plain": inspected(value) };
    return sendable(bundle as Bundle);
  } catch (error) {
    if (isInterrupted(error)) throw error;
    const reason = error instanceof Error ? `${error.name}: ${error.message}` : String(error);
    return { "text/plain": `${inspected(value)}\n(its display failed: ${reason})` };
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

/** A bundle as JSON has it: bytes in Base64, and an error for what JSON cannot hold. */
function sendable(bundle: Bundle): Bundle {
  const parts = Object.entries(bundle).map(([type, part]) => {
    if (typeof part === "string") return [type, part];
    if (part instanceof Uint8Array) return [type, Buffer.from(part).toString("base64")];
    const text = JSON.stringify(part) as string | undefined;
    return [type, text === undefined ? undefined : JSON.parse(text)];
  });
  return Object.fromEntries(parts.filter(([, part]) => part !== undefined));
}

/** A value's inspected text. */
export function inspected(value: unknown): string {
  try {
    return inspect(value, { depth: 4, maxArrayLength: 100, maxStringLength: 10_000, breakLength: 100 });
  } catch (error) {
    return `(a value that cannot be shown: ${(error as Error).message})`;
  }
}
