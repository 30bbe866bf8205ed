import type { Numpy } from "./numpy.js";
import type { Table } from "./table.js";

/** What a bench gets: a folder for its files and the numpy side, where there is one. */
export interface Bench {
  readonly folder: string;
  readonly numpy: Numpy | undefined;
}

/** One bench: a name to ask for it by, and what it measures. */
export type BenchRun = (bench: Bench) => Promise<Table>;
