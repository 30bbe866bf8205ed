import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

/** The compiled kernels of src/numeric/kernels. Pointers are byte offsets into `memory`. */
interface Kernels {
  readonly memory: { readonly buffer: ArrayBuffer; grow(pages: number): number };
  eliminate(r: number, block: number, stride: number, m: number, rows: number, work: number): void;
  residualPairs(
    ...args: [
      x: number,
      stride: number,
      k: number,
      rows: number,
      y: number,
      beta: number,
      high: number,
      low: number,
    ]
  ): void;
  gradient(
    ...args: [x: number, stride: number, k: number, rows: number, high: number, low: number, sums: number]
  ): void;
  correctResiduals(
    ...args: [x: number, stride: number, k: number, rows: number, change: number, high: number, low: number]
  ): void;
  multiplyRows(x: number, stride: number, k: number, rows: number, u: number): void;
  movingSums(
    ...args: [entering: number, leaving: number, stride: number, k: number, rows: number, running: number]
  ): void;
  addProducts(
    ...args: [
      a: number,
      strideA: number,
      b: number,
      strideB: number,
      k: number,
      rows: number,
      upper: boolean,
      result: number,
      work: number,
    ]
  ): void;
  filter(
    ...args: [
      x: number,
      stride: number,
      k: number,
      rows: number,
      weights: number,
      last: number,
      out: number,
      outStride: number,
    ]
  ): void;
}

/** Stretches of the kernels' memory for one call. Nothing is kept there between calls. */
export interface Workspace {
  readonly kernels: Kernels;
  /** All of the memory. */
  readonly numbers: Float64Array;
  /** Where each stretch begins, in numbers; times eight it is a kernel's pointer. */
  readonly at: readonly number[];
}

const pageBytes = 65_536;
/** The first numbers are left alone: pointer zero is nobody's. */
const firstNumber = 16;

let loaded: Kernels | undefined;

/** Stretches of the given lengths, zeroed. The memory grows to the most that was ever asked for and is used again. */
export function workspace(...lengths: number[]): Workspace {
  loaded ??= load();
  let next = firstNumber;
  const at = lengths.map((length) => {
    const start = next;
    next += 2 * Math.ceil(length / 2);
    return start;
  });
  const short = next * 8 - loaded.memory.buffer.byteLength;
  if (short > 0) loaded.memory.grow(Math.ceil(short / pageBytes));
  const numbers = new Float64Array(loaded.memory.buffer);
  numbers.fill(0, firstNumber, next);
  return { kernels: loaded, numbers, at };
}

function load(): Kernels {
  let root = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(root, "package.json"))) root = dirname(root);
  const file = join(root, "dist", "src", "numeric", "kernels.wasm");
  if (!existsSync(file)) throw new Error(`The numeric kernels are missing (${file}). Run \`npm run build\`.`);
  const { Module, Instance } = WebAssembly;
  return new Instance(new Module(readFileSync(file))).exports as unknown as Kernels;
}

/** Rows up to a multiple of `of`, as the kernels count them. */
export const padded = (rows: number, of = 4): number => Math.ceil(rows / of) * of;
