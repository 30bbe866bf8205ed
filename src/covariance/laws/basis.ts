import { addTimesAt, dotAt } from "../shape/vectors.js";

/** Orthonormal vectors side by side in one array that grows as they come. */
export class Basis {
  data: Float64Array;
  count = 0;

  constructor(readonly size: number) {
    this.data = new Float64Array(16 * size);
  }

  /** Keeps a copy of the vector and says where it starts. */
  add(x: Float64Array): number {
    const at = this.count * this.size;
    if (at + this.size > this.data.length) {
      const larger = new Float64Array(2 * this.data.length);
      larger.set(this.data);
      this.data = larger;
    }
    this.data.set(x, at);
    this.count++;
    return at;
  }

  /**
   * Takes the parts along the basis out of x, the latest vectors first: theirs are the large parts, and what errors
   * taking them out leaves along earlier ones goes next.
   */
  reduce(x: Float64Array): void {
    const { data, size } = this;
    for (let i = this.count - 1; i >= 0; i--) {
      addTimesAt(x, 0, -dotAt(data, i * size, x, 0, size), data, i * size, size);
    }
  }
}
