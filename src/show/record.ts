import type { Result } from "../data/index.js";
import { lagbookVersion } from "./version.js";

/** The MIME type of the record that goes with everything shown. */
export const recordType = "application/vnd.lagbook+json";

/** What a rerun compares: a shown result as numbers at full precision, and what made it. */
export interface LagbookRecord {
  /** Version of this layout. */
  readonly lagbook: 1;
  readonly kind: string;
  readonly value: Record<string, unknown>;
  /** Further figures on the card. */
  readonly shown?: Record<string, unknown>;
  readonly versions: { readonly node: string; readonly lagbook: string };
  readonly seed?: number | string;
  /** Hash of the data that the result came from. */
  readonly fingerprint?: string;
}

/** The record of a result. Numbers that JSON has no writing for (NaN, infinities) become null. */
export function recordOf(result: Result, shown?: Record<string, unknown>): LagbookRecord {
  const { seed } = result as { seed?: unknown };
  const fingerprint = fingerprintOf(result);
  return {
    lagbook: 1,
    kind: result.kind,
    value: plain(result.toJSON()) as Record<string, unknown>,
    ...(shown === undefined ? {} : { shown: plain(shown) as Record<string, unknown> }),
    versions: { node: process.versions.node, lagbook: lagbookVersion() },
    ...(typeof seed === "number" || typeof seed === "string" ? { seed } : {}),
    ...(fingerprint === undefined ? {} : { fingerprint }),
  };
}

/** The fingerprint of the data that a result came from, wherever it carries it. */
export function fingerprintOf(result: unknown): string | undefined {
  const { fingerprint, about } = result as { fingerprint?: unknown; about?: { fingerprint?: unknown } };
  const found = fingerprint ?? about?.fingerprint;
  return typeof found === "string" ? found : undefined;
}

// A record leaves the process as JSON: what is shown here is what is read back there. Typed arrays become arrays.
function plain(value: unknown): unknown {
  if (typeof value === "number") return Number.isFinite(value) ? value : null;
  if (typeof value === "bigint") return String(value);
  if (typeof value !== "object" || value === null) return typeof value === "function" ? undefined : value;
  if (value instanceof Date) return value.toISOString();
  if (ArrayBuffer.isView(value)) return Array.from(value as unknown as ArrayLike<number>, plain);
  if (Array.isArray(value)) return value.map((item) => plain(item) ?? null);
  const json = (value as { toJSON?: () => unknown }).toJSON;
  if (typeof json === "function") return plain(json.call(value));
  return Object.fromEntries(
    Object.entries(value)
      .filter(([, item]) => item !== undefined && typeof item !== "function")
      .map(([key, item]) => [key, plain(item)]),
  );
}
