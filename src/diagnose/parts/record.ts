import { recordable } from "./words.js";

/** A value as it goes into a JSON record: typed arrays as lists, numbers that are not finite as null. */
export function record(value: unknown): unknown {
  if (typeof value === "number") return recordable(value);
  if (value instanceof Float64Array || value instanceof Int32Array)
    return Array.from(value as Float64Array, recordable);
  if (Array.isArray(value)) return value.map(record);
  if (value && typeof value === "object")
    return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, record(item)]));
  return value;
}
