/*
 * Rows of KD²K along its band, and what they add to tr((DKD)³) and tr((DKD)⁴); D² is given by its diagonal, the squared
 * weights.
 */

/** Σ over the band, given row s of KD²K from the diagonal on. */
function accumulate(
  squares: Float64Array,
  row: Float64Array,
  s: number,
  values: Float64Array,
  sums: { third: number; fourth: number },
): void {
  const n = squares.length;
  const last = row.length - 1;
  const end = Math.min(2 * last, n - 1 - s);
  const near = Math.min(last, end);
  let third = (squares[s]! * values[0]! * row[0]!) / 2;
  let fourth = (squares[s]! * values[0]! * values[0]!) / 2;
  for (let d = 1; d <= near; d++) {
    const product = squares[s + d]! * values[d]!;
    third += product * row[d]!;
    fourth += product * values[d]!;
  }
  for (let d = near + 1; d <= end; d++) fourth += squares[s + d]! * values[d]! * values[d]!;
  sums.third += 2 * squares[s]! * third;
  sums.fourth += 2 * squares[s]! * fourth;
}

/** By plain sums of products. */
export function productBand(squares: Float64Array, row: Float64Array): { third: number; fourth: number } {
  const n = squares.length;
  const last = row.length - 1;
  const width = 2 * last + 1;
  const symmetric = mirrored(row);
  const padded = new Float64Array(n + 2 * last);
  padded.set(squares, last);
  const window = new Float64Array(width);
  const values = new Float64Array(width);
  const sums = { third: 0, fourth: 0 };
  for (let s = 0; s < n; s++) {
    if (squares[s] === 0) continue;
    for (let i = 0; i < width; i++) window[i] = padded[s + i]! * symmetric[i]!;
    for (let d = 0; d < width; d++) {
      let sum = 0;
      for (let i = d; i < width; i++) sum += window[i]! * symmetric[i - d]!;
      values[d] = sum;
    }
    accumulate(squares, row, s, values, sums);
  }
  return sums;
}

/** κ at lags −last to last. */
function mirrored(row: Float64Array): Float64Array {
  const last = row.length - 1;
  return Float64Array.from({ length: 2 * last + 1 }, (_, i) => row[Math.abs(i - last)]!);
}

/** For Bartlett weights each row is two moving sums of a window, or four for a bandwidth that is not whole. */
export function boxBand(
  squares: Float64Array,
  bandwidth: number,
  last: number,
): { third: number; fourth: number } {
  const n = squares.length;
  const width = 2 * last + 1;
  const whole = Math.floor(bandwidth);
  const above = (whole + 1) * (1 - whole / bandwidth);
  const row = Float64Array.from({ length: last + 1 }, (_, j) => 1 - j / bandwidth);
  const symmetric = mirrored(row);
  const padded = new Float64Array(n + 2 * last);
  padded.set(squares, last);
  const window = new Float64Array(width);
  const values = new Float64Array(width);
  const sums = { third: 0, fourth: 0 };
  const cumulated = new Float64Array(2 * width + whole + 4);
  for (let s = 0; s < n; s++) {
    if (squares[s] === 0) continue;
    for (let i = 0; i < width; i++) window[i] = padded[s + i]! * symmetric[i]!;
    values.fill(0);
    addBoxes(window, whole, (1 - above) / whole, cumulated, values);
    if (above > 0) addBoxes(window, whole + 1, above / (whole + 1), cumulated, values);
    accumulate(squares, row, s, values, sums);
  }
  return sums;
}

/**
 * values[d] += factor · Σ_i (length − |d + last − i|)⁺ window[i]: sums of `length` neighbours, then sums of `length` of those. The
 * first row asked for, d = 0, lies at the window's middle.
 */
function addBoxes(
  window: Float64Array,
  length: number,
  factor: number,
  sums: Float64Array,
  values: Float64Array,
): void {
  const width = window.length;
  const middle = (width - 1) / 2;
  const end = width - 1 + length;
  // sums[r] is the sum of the `length` entries of the window that end at middle + r.
  let running = 0;
  for (let i = Math.max(0, middle - length + 1); i < middle; i++) running += window[i]!;
  for (let r = 0; r < end; r++) {
    const entering = middle + r;
    const leaving = entering - length;
    if (entering < width) running += window[entering]!;
    if (r > 0 && leaving >= 0 && leaving < width) running -= window[leaving]!;
    sums[r] = running;
  }
  running = 0;
  for (let r = 0; r < length - 1; r++) running += sums[r]!;
  for (let d = 0; d < width; d++) {
    running += sums[d + length - 1]!;
    values[d]! += factor * running;
    running -= sums[d]!;
  }
}
