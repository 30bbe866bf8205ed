import { createHash } from "node:crypto";
import type { Column } from "./column.js";
import type { TimeIndex } from "./time/time-index.js";

/**
 * SHA-256, in hexadecimal, over the canonical content of a table: step, ordinals, then each column's name, kind and
 * values (numbers as IEEE 754 bytes, −0 as 0, every NaN alike). Two files with the same numbers have the same one.
 */
export function fingerprintOf(index: TimeIndex, columns: readonly Column[]): string {
  const hash = createHash("sha256");
  hash.update(JSON.stringify([index.name, index.step.unit, index.step.count, index.step.offset ?? 0]));
  hash.update(bytes(index.ordinals));
  for (const column of columns) {
    hash.update(JSON.stringify([column.name, column.kind]));
    if (column.kind === "text") hash.update(JSON.stringify(column.values));
    else hash.update(bytes(canonical(column.values)));
  }
  return hash.digest("hex");
}

function canonical(values: Float64Array): Float64Array {
  const result = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    result[i] = Number.isNaN(value) ? Number.NaN : value + 0;
  }
  return result;
}

function bytes(values: Float64Array): Uint8Array {
  return new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
}
