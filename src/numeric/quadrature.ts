const cache = new Map<number, { nodes: Float64Array; weights: Float64Array }>();

/** Gauss–Legendre nodes and weights of order n on [a, b]; roots of P_n by Newton's iteration from Tricomi's start. */
export function gaussLegendre(
  n: number,
  a: number,
  b: number,
): { nodes: Float64Array; weights: Float64Array } {
  const unit = cache.get(n) ?? onUnitInterval(n);
  cache.set(n, unit);
  const half = (b - a) / 2;
  const middle = (a + b) / 2;
  return { nodes: unit.nodes.map((x) => middle + half * x), weights: unit.weights.map((w) => half * w) };
}

function onUnitInterval(n: number): { nodes: Float64Array; weights: Float64Array } {
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let x = -Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let step = 0; step < 100; step++) {
      let before = 1;
      let value = x;
      for (let m = 2; m <= n; m++) {
        const next = ((2 * m - 1) * x * value - (m - 1) * before) / m;
        before = value;
        value = next;
      }
      slope = (n * (x * value - before)) / (x * x - 1);
      const move = value / slope;
      x -= move;
      if (Math.abs(move) < 1e-16) break;
    }
    nodes[i] = x;
    weights[i] = 2 / ((1 - x * x) * slope * slope);
  }
  return { nodes, weights };
}
