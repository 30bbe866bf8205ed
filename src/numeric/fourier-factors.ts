/** Cosine and sine of 2πp/n to the last bit or so: the angle is brought below an eighth of a turn first. */
export function unitRoot(p: number, n: number): readonly [cos: number, sin: number] {
  const turned = p % n;
  const eighths = Math.floor((8 * turned) / n);
  const within = eighths % 2 === 0 ? turned - (eighths * n) / 8 : ((eighths + 1) * n) / 8 - turned;
  const angle = (2 * Math.PI * within) / n;
  const cos = Math.cos(angle);
  const sin = Math.sin(angle);
  switch (eighths) {
    case 0:
      return [cos, sin];
    case 1:
      return [sin, cos];
    case 2:
      return [-sin, cos];
    case 3:
      return [-cos, sin];
    case 4:
      return [-cos, -sin];
    case 5:
      return [-sin, -cos];
    case 6:
      return [sin, -cos];
    default:
      return [cos, -sin];
  }
}

const known = new Map<number, Float64Array>();

/**
 * The factors of a short transform of length n as the kernel reads them: for each m < n/4 cosine and sine of 2πm/n, of twice
 * and of three times that angle; then the same for n/4, and so on.
 */
export function shortFactors(n: number): Float64Array {
  const held = known.get(n);
  if (held) return held;
  const factors: number[] = [];
  for (let size = n; size >= 4; size /= 4) {
    for (let m = 0; m < size / 4; m++)
      for (let times = 1; times <= 3; times++) factors.push(...unitRoot(m * times, size));
  }
  const table = Float64Array.from(factors);
  known.set(n, table);
  return table;
}

let latest: { n: number; tables: readonly [Float64Array, Float64Array] } | undefined;

/**
 * e^{−2πip/n} for every p as products of two: cosine and sine by turns at p = 0, step, 2·step, ... and at p = 0, 1, ..., step − 1.
 */
export function turns(n: number, step: number): readonly [coarse: Float64Array, fine: Float64Array] {
  if (latest?.n !== n) {
    const table = (length: number, stride: number): Float64Array => {
      const result = new Float64Array(2 * length);
      for (let i = 0; i < length; i++) result.set(unitRoot(i * stride, n), 2 * i);
      return result;
    };
    latest = { n, tables: [table(n / step, step), table(step, 1)] };
  }
  return latest.tables;
}
