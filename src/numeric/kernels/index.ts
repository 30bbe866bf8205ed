// AssemblyScript, compiled to dist/src/numeric/kernels.wasm by `npm run build`. Pointers are byte offsets into the
// module's memory, laid out by the caller; counts of rows are multiples of four (pad with zeros). Every sum runs in
// four interleaved parts, rows 0, 4, 8, ..., rows 1, 5, 9, ... and so on, added as (0 + 2) + (1 + 3).
export { divideByTriangle } from "./divide";
export { eliminate } from "./eliminate";
export { filter } from "./filter";
export { fourier } from "./fourier";
export { addProducts, movingSums, multiplyRows } from "./products";
export { correctResiduals, gradient, residualPairs } from "./refine";
