import { counterRandom } from "../../numeric/index.js";

const SEED = 20_250_101;
const known = new Map<string, Float64Array>();

/** A fixed random direction in n dimensions, to start a Krylov process from; not to be written to. */
export function direction(n: number, replicate: number): Float64Array {
  const key = `${n} ${replicate}`;
  let vector = known.get(key);
  if (!vector) {
    vector = counterRandom(SEED, replicate).fillNormal(new Float64Array(n));
    if (known.size > 50) known.clear();
    known.set(key, vector);
  }
  return vector;
}
