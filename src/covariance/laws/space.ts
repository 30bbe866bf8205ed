import type { Matrix } from "../../numeric/index.js";
import { addTimesAt, dot, dotAt, scale } from "../shape/vectors.js";
import type { LagOperator } from "./toeplitz.js";

/** Vectors x orthonormal in the inner product x'Ωy, side by side, with their images Ωx. */
export class Space {
  readonly vectors: Float64Array;
  readonly images: Float64Array;
  count = 0;
  readonly #image: Float64Array;

  constructor(
    readonly size: number,
    readonly most: number,
    readonly omega: LagOperator,
  ) {
    this.vectors = new Float64Array(size * most);
    this.images = new Float64Array(size * most);
    this.#image = new Float64Array(size);
  }

  /** Scales x to unit length and keeps a copy. Returns the length it had; nothing is kept of length zero. */
  admit(x: Float64Array): number {
    const image = this.#image;
    this.omega(x, 0, image, 0);
    const square = dot(x, image);
    if (!(square > 0)) return 0;
    const length = Math.sqrt(square);
    scale(x, 1 / length);
    scale(image, 1 / length);
    this.vectors.set(x, this.count * this.size);
    this.images.set(image, this.count * this.size);
    this.count++;
    return length;
  }

  /**
   * Takes the space out of x, the latest vectors first: theirs are the large parts, and what errors taking them out
   * leaves along earlier ones goes next. Given products, the parts are column j of a projected matrix.
   */
  reduce(x: Float64Array, products?: Matrix, j = 0): void {
    const { vectors, images, size } = this;
    for (let i = this.count - 1; i >= 0; i--) {
      const part = dotAt(images, i * size, x, 0, size);
      addTimesAt(x, 0, -part, vectors, i * size, size);
      if (products) products.data[j * products.rows + i] = products.data[i * products.rows + j] = part;
    }
  }

  /** Whether a reduced vector is more than rounding errors; where most of it cancelled it is reduced once more. */
  independent(x: Float64Array, before: number): boolean {
    const after = dot(x, x);
    if (after > 0.01 * before) return true;
    this.reduce(x);
    const again = dot(x, x);
    return again > 0.25 * after && again > 1e-24 * before;
  }
}
