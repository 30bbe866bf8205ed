import { normal } from "./distributions/normal.js";

const m0 = 0xd2511f53;
const m1 = 0xcd9e8d57;
const w0 = 0x9e3779b9;
const w1 = 0xbb67ae85;

/** Random numbers of one replicate. Every call moves on along the replicate's own stream. */
export interface CounterRandom {
  /** Uniform on (0, 1), 53 bits, never 0 or 1. */
  uniform(): number;
  /** Standard normal, by inversion of one uniform, so that the n-th normal depends on the n-th uniform alone. */
  normal(): number;
  /** Uniform on 0, 1, ..., n − 1; n at most 2³². */
  integer(n: number): number;
  /** Fills an array with standard normals. */
  fillNormal(target: Float64Array): Float64Array;
}

/**
 * A counter-based generator keyed by (seed, replicate): Philox 4×32 with ten rounds (Salmon, Moraes, Dror and Shaw
 * 2011). Replicates are independent streams, so work can be split among any number of workers with the same bits.
 * `seed` and `replicate` are whole numbers from 0 to 2⁵³ − 1.
 */
export function counterRandom(seed: number, replicate: number): CounterRandom {
  const key = [seed >>> 0, Math.floor(seed / 2 ** 32) >>> 0] as const;
  const high = [replicate >>> 0, Math.floor(replicate / 2 ** 32) >>> 0] as const;
  const block = new Uint32Array(4);
  let counter = 0;
  let used = 4;
  const word = () => {
    if (used === 4) {
      block[0] = counter >>> 0;
      block[1] = Math.floor(counter / 2 ** 32) >>> 0;
      block[2] = high[0];
      block[3] = high[1];
      philox(block, key[0], key[1]);
      counter++;
      used = 0;
    }
    return block[used++]!;
  };
  const uniform = () => {
    const a = word() >>> 5;
    const b = word() >>> 6;
    return (a * 67108864 + b + 0.5) / 9007199254740992;
  };
  const draw = () => normal.quantile(uniform());
  return {
    uniform,
    normal: draw,
    integer: (n) => Math.floor(uniform() * n),
    fillNormal(target) {
      for (let i = 0; i < target.length; i++) target[i] = draw();
      return target;
    },
  };
}

/** Ten rounds over the four counter words, in place. */
export function philox(c: Uint32Array, k0: number, k1: number): void {
  for (let round = 0; round < 10; round++) {
    const low0 = Math.imul(m0, c[0]!) >>> 0;
    const low1 = Math.imul(m1, c[2]!) >>> 0;
    const high0 = highProduct(m0, c[0]!);
    const high1 = highProduct(m1, c[2]!);
    const c1 = c[1]!;
    const c3 = c[3]!;
    c[0] = high1 ^ c1 ^ k0;
    c[1] = low1;
    c[2] = high0 ^ c3 ^ k1;
    c[3] = low0;
    k0 = (k0 + w0) >>> 0;
    k1 = (k1 + w1) >>> 0;
  }
}

/** Upper 32 bits of the 64-bit product of two 32-bit words. */
function highProduct(a: number, b: number): number {
  const al = a & 0xffff;
  const ah = a >>> 16;
  const bl = b & 0xffff;
  const bh = b >>> 16;
  const middle = ah * bl + ((al * bl) >>> 16);
  const low = al * bh + (middle & 0xffff);
  return (ah * bh + Math.floor(middle / 65536) + Math.floor(low / 65536)) >>> 0;
}
