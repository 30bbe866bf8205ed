/** Columns gathered at once: as many numbers as a line of the processor's cache holds. */
const COLUMNS = 8;

/**
 * A long transform as many short ones (Bailey's four steps): with t = n₂t₁ + t₂ and j = j₁ + n₁j₂, columns of length n₁, a
 * turn by e^{−2πit₂j₁/n}, rows of length n₂, and a transposition. Memory is gone through a few times instead of once
 * for every factor of n. `short` transforms the pieces in place.
 */
export function longTransform(
  re: Float64Array,
  im: Float64Array,
  short: (re: Float64Array, im: Float64Array) => void,
): void {
  const n = re.length;
  const n1 = 2 ** Math.ceil(Math.log2(n) / 2);
  const n2 = n / n1;
  const turns = turnsOf(n);
  const columnsRe = Array.from({ length: COLUMNS }, () => new Float64Array(n1));
  const columnsIm = Array.from({ length: COLUMNS }, () => new Float64Array(n1));
  for (let first = 0; first < n2; first += COLUMNS) {
    for (let t1 = 0; t1 < n1; t1++) {
      const at = t1 * n2 + first;
      for (let c = 0; c < COLUMNS; c++) {
        columnsRe[c]![t1] = re[at + c]!;
        columnsIm[c]![t1] = im[at + c]!;
      }
    }
    for (let c = 0; c < COLUMNS; c++) {
      short(columnsRe[c]!, columnsIm[c]!);
      turn(columnsRe[c]!, columnsIm[c]!, first + c, turns);
    }
    for (let j1 = 0; j1 < n1; j1++) {
      const at = j1 * n2 + first;
      for (let c = 0; c < COLUMNS; c++) {
        re[at + c] = columnsRe[c]![j1]!;
        im[at + c] = columnsIm[c]![j1]!;
      }
    }
  }
  for (let j1 = 0; j1 < n1; j1++) {
    short(re.subarray(j1 * n2, (j1 + 1) * n2), im.subarray(j1 * n2, (j1 + 1) * n2));
  }
  const held = new Float64Array(n);
  transpose(re, n1, n2, held);
  transpose(im, n1, n2, held);
}

/** e^{−2πij/n} as a product of two short tables. */
interface Turns {
  readonly n: number;
  readonly step: number;
  readonly coarseCos: Float64Array;
  readonly coarseSin: Float64Array;
  readonly fineCos: Float64Array;
  readonly fineSin: Float64Array;
}

let latest: Turns | undefined;

function turnsOf(n: number): Turns {
  if (latest?.n === n) return latest;
  const step = 1024;
  const angle = (2 * Math.PI) / n;
  const table = (length: number, stride: number, f: (x: number) => number): Float64Array =>
    Float64Array.from({ length }, (_, i) => f(i * stride * angle));
  latest = {
    n,
    step,
    coarseCos: table(n / step, step, Math.cos),
    coarseSin: table(n / step, step, Math.sin),
    fineCos: table(step, 1, Math.cos),
    fineSin: table(step, 1, Math.sin),
  };
  return latest;
}

/** Turns entry j₁ by e^{−2πi·column·j₁/n}. */
function turn(re: Float64Array, im: Float64Array, column: number, turns: Turns): void {
  const { coarseCos, coarseSin, fineCos, fineSin } = turns;
  for (let j1 = 0, at = 0; j1 < re.length; j1++, at += column) {
    const coarse = at >>> 10;
    const fine = at & 1023;
    const c = coarseCos[coarse]! * fineCos[fine]! - coarseSin[coarse]! * fineSin[fine]!;
    const s = coarseSin[coarse]! * fineCos[fine]! + coarseCos[coarse]! * fineSin[fine]!;
    const x = re[j1]!;
    const y = im[j1]!;
    re[j1] = x * c + y * s;
    im[j1] = y * c - x * s;
  }
}

/** The n₁×n₂ array's transpose, in tiles, by way of `held`. */
function transpose(x: Float64Array, n1: number, n2: number, held: Float64Array): void {
  const tile = 16;
  for (let i0 = 0; i0 < n1; i0 += tile) {
    for (let j0 = 0; j0 < n2; j0 += tile) {
      for (let i = i0; i < i0 + tile; i++) {
        for (let j = j0; j < j0 + tile; j++) held[j * n1 + i] = x[i * n2 + j]!;
      }
    }
  }
  x.set(held);
}
