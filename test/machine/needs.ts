import { existsSync } from "node:fs";
import { places } from "../../kernel/install/places.js";
import { findChromium } from "./chromium.js";

/** Whether nothing may be skipped. */
export const strict = Boolean(process.env["CI"]) && process.env["CI"] !== "false";

/** The interpreter of the checkout's .venv, which `npm test` fills with the pinned packages. */
export const python = places().python;

/**
 * For a test's `skip` option: false if what the test needs is there, or why it is not. Under CI a missing thing is an
 * error instead.
 */
export function without(...needs: readonly ("python" | "chromium")[]): false | string {
  const missing: string[] = [];
  if (needs.includes("python") && !existsSync(python)) missing.push("no .venv (npm test makes it)");
  if (needs.includes("chromium") && !findChromium())
    missing.push("no Chromium (set LAGBOOK_CHROMIUM to one)");
  if (missing.length === 0) return false;
  if (strict) throw new Error(`Needed by this test: ${missing.join("; ")}`);
  return missing.join("; ");
}
