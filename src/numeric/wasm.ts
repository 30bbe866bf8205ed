import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

/** The compiled kernels of src/numeric/kernels. Pointers are byte offsets into `memory`. */
interface Kernels {
  readonly memory: { readonly buffer: ArrayBuffer; grow(pages: number): number };
  eliminate(r: number, block: number, stride: number, m: number, rows: number, work: number): void;
  divideByTriangle(x: number, stride: number, k: number, rows: number, r: number): void;
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
  fourier(
    ...args: [
      re: number,
      im: number,
      outRe: number,
      outIm: number,
      n1: number,
      n2: number,
      factors1: number,
      factors2: number,
      coarse: number,
      fine: number,
      shift: number,
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

/** Stretches of the kernels' memory for one call. Nothing in them lasts beyond it. */
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

/** More memory than this is not kept for the next call. */
const keptBytes = 2 ** 28;

let kernelModule: WebAssembly.Module | undefined;
let lasting: Kernels | undefined;

/** Stretches of the given lengths, zeroed. */
export function workspace(...lengths: number[]): Workspace {
  const space = roughWorkspace(...lengths);
  space.numbers.fill(0, firstNumber, firstNumber + total(lengths));
  return space;
}

/** Stretches of the given lengths, with whatever was there before. */
export function roughWorkspace(...lengths: number[]): Workspace {
  const bytes = 8 * (firstNumber + total(lengths));
  const kernels = bytes > keptBytes ? instance() : theLasting();
  const short = bytes - kernels.memory.buffer.byteLength;
  if (short > 0) kernels.memory.grow(Math.ceil(short / pageBytes));
  let next = firstNumber;
  const at = lengths.map((length) => {
    const start = next;
    next += even(length);
    return start;
  });
  return { kernels, numbers: new Float64Array(kernels.memory.buffer), at };
}

/** Stretches begin at whole vectors. */
const even = (length: number): number => 2 * Math.ceil(length / 2);
const total = (lengths: readonly number[]): number => lengths.reduce((sum, length) => sum + even(length), 0);

function theLasting(): Kernels {
  lasting ??= instance();
  return lasting;
}

function instance(): Kernels {
  kernelModule ??= load();
  return new WebAssembly.Instance(kernelModule).exports as unknown as Kernels;
}

function load(): WebAssembly.Module {
  let root = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(root, "package.json"))) root = dirname(root);
  const file = join(root, "dist", "src", "numeric", "kernels.wasm");
  if (!existsSync(file)) throw new Error(`The numeric kernels are missing (${file}). Run \`npm run build\`.`);
  return new WebAssembly.Module(readFileSync(file));
}

/** Rows up to a multiple of `of`, as the kernels count them. */
export const padded = (rows: number, of = 4): number => Math.ceil(rows / of) * of;
