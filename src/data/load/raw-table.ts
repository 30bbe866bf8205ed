import type { Remark } from "../result.js";

/** A column as it was read: numbers (missing: NaN), truth values (0, 1, NaN), texts (missing: null), or times. */
export type RawColumn =
  | { readonly name: string; readonly kind: "number" | "boolean"; readonly values: Float64Array }
  | { readonly name: string; readonly kind: "text"; readonly values: readonly (string | null)[] }
  | RawInstants;

/** Dates or times that the source holds as such. */
export interface RawInstants {
  readonly name: string;
  readonly kind: "instant";
  readonly form: "date" | "date-time";
  /** Milliseconds (missing: NaN): instants where `offset`, else the wall clock read as if it were UTC. */
  readonly values: Float64Array;
  /** Whether the source says how far its clock was from UTC. Dates have no offset. */
  readonly offset: boolean;
  /** With `offset`: the clock as written, where it was not UTC's. */
  readonly walls?: Float64Array;
}

/** What a reader hands on: columns of one length, among them the time column. */
export interface RawTable {
  readonly columns: readonly RawColumn[];
  /** How it was read, where a reader must know. */
  readonly findings: readonly Remark[];
  /** How the source is called in messages and provenance. */
  readonly description: string;
  /** SHA-256 of the file's bytes. */
  readonly fingerprint?: string;
}
