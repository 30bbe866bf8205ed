const RATIO = (Math.sqrt(5) - 1) / 2;

/** Where a function with one minimum between a and b takes it, to within `width`, by golden section. */
export function goldenMinimum(f: (x: number) => number, a: number, b: number, width: number): number {
  let left = b - RATIO * (b - a);
  let right = a + RATIO * (b - a);
  let atLeft = f(left);
  let atRight = f(right);
  while (b - a > width) {
    if (atLeft <= atRight) {
      b = right;
      right = left;
      atRight = atLeft;
      left = b - RATIO * (b - a);
      atLeft = f(left);
    } else {
      a = left;
      left = right;
      atLeft = atRight;
      right = a + RATIO * (b - a);
      atRight = f(right);
    }
  }
  return (a + b) / 2;
}
