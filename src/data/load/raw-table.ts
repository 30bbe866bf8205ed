import type { Remark } from "../result.js";

/** A column as it was read: numbers (missing: NaN), truth values, or texts (missing: null). */
export type RawColumn =
  | { readonly name: string; readonly kind: "number" | "boolean"; readonly values: Float64Array }
  | { readonly name: string; readonly kind: "text"; readonly values: readonly (string | null)[] };

/** What a reader hands on: columns of one length, among them the time column, as text or as numbers. */
export interface RawTable {
  readonly columns: readonly RawColumn[];
  /** How it was read, where a reader must know. */
  readonly findings: readonly Remark[];
  /** How the source is called in messages and provenance. */
  readonly description: string;
  /** SHA-256 of the file's bytes. */
  readonly fingerprint?: string;
}
