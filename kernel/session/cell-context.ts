import { AsyncLocalStorage } from "node:async_hooks";
import type { Output } from "./output.js";

/** The cell on whose behalf code runs, also when that code outlives the cell (a timer, say). */
export interface CellContext {
  emit(output: Output): void;
  ask(question: string, hidden: boolean): string;
  /** Whether the person wants the cell to end. */
  stopRequested(): boolean;
  /** Ids of displays of the session. */
  readonly shown: Set<string>;
  nextDisplayId(): string;
}

/** Carries the present cell through everything that it starts. */
export const cellContext = new AsyncLocalStorage<CellContext>();

/** The present cell, for a function that only a cell can call. */
export function currentCell(asked: string): CellContext {
  const cell = cellContext.getStore();
  if (!cell) throw new Error(`${asked} works only in a notebook's cell`);
  return cell;
}
