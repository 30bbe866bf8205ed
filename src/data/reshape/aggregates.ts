/** Makes one number of the values of a part of a series; missing values (NaN) are among them. */
export type Aggregate = (values: Float64Array) => number;

const named = <A extends Aggregate>(name: string, make: A): A =>
  Object.defineProperty(make, "name", { value: name });

/** The mean; missing when any value is. */
export const mean: Aggregate = named("mean", (values) => sum(values) / values.length);

/** The sum; missing when any value is. */
export const sum: Aggregate = named("sum", (values) => {
  let total = 0;
  for (const value of values) total += value;
  return total;
});

/** The last value. */
export const last: Aggregate = named("last", (values) => values[values.length - 1]!);

/** The first value. */
export const first: Aggregate = named("first", (values) => values[0]!);

/** The largest value; missing when any value is. */
export const max: Aggregate = named("max", (values) => values.reduce((a, b) => Math.max(a, b)));

/** The smallest value; missing when any value is. */
export const min: Aggregate = named("min", (values) => values.reduce((a, b) => Math.min(a, b)));
