/** The hyperbola z(v) = centre + scale (tilt (cosh v − 1) + i √(1 − tilt²) sinh v); a tilt of zero makes it a vertical line. */
export interface Contour {
  readonly centre: number;
  readonly scale: number;
  /** Between −1 and 1: how far it bends to the right (left when negative). */
  readonly tilt: number;
}

/**
 * (1/2πi) ∫ exp(K(z)) / z dz upwards along a contour through a saddle point, for a K that is real on the real line: a
 * tail probability whose logarithmic moment generating function is in K (Daniels 1954; Rice 1980). Its sign is the
 * centre's. By the trapezoid rule, whose step is halved until the value stands still; no digits cancel.
 *
 * @param logMoment K at re + i·im, as [real, imaginary] parts
 */
export function alongContour(
  logMoment: (re: number, im: number) => [number, number],
  { centre, scale, tilt }: Contour,
): number {
  const [base] = logMoment(centre, 0);
  const upright = Math.sqrt(1 - tilt * tilt);
  const value = (v: number) => {
    const cosh = scale * Math.cosh(v);
    const sinh = scale * Math.sinh(v);
    const re = centre + tilt * (cosh - scale);
    const im = upright * sinh;
    const [logSize, angle] = logMoment(re, im);
    const size = Math.exp(logSize - base) / (re * re + im * im);
    // Im[e^{iθ} (dz/dv) z̄] with dz/dv = tilt sinh v + i √(1 − tilt²) cosh v
    const along = tilt * sinh * re + upright * cosh * im;
    const across = upright * cosh * re - tilt * sinh * im;
    return {
      term: size * (Math.cos(angle) * across + Math.sin(angle) * along),
      size: size * Math.hypot(along, across),
    };
  };
  let step = 0.4;
  const first = value(0);
  let sum = first.term / 2;
  let reach = 0;
  for (let v = step; v < 100; v += step) {
    const { term, size } = value(v);
    sum += term;
    reach = v;
    if (!(size > 1e-17 * first.size)) break;
  }
  let estimate = sum * step;
  for (let halving = 0; halving < 6; halving++) {
    for (let v = step / 2; v < reach; v += step) sum += value(v).term;
    step /= 2;
    const next = sum * step;
    const moved = Math.abs(next - estimate);
    estimate = next;
    // Each halving squares the relative error, so a move of 1e-7 leaves one of about 1e-14.
    if (moved <= 1e-7 * Math.abs(next)) break;
  }
  return (Math.exp(base) / Math.PI) * estimate;
}
