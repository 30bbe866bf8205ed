import { type CellContext, cellContext } from "./cell-context.js";

/**
 * Takes what cells throw when nobody waits for them any more: in a timer, or in a promise that was let go. It would end
 * the process otherwise.
 *
 * @param report is told the error, and the cell that it belongs to where that is known
 * @returns stops taking them
 */
export function guardErrors(report: (error: unknown, cell: CellContext | undefined) => void): () => void {
  const take = (error: unknown) => report(error, cellContext.getStore());
  const events = ["uncaughtException", "unhandledRejection"] as const;
  for (const event of events) process.on(event, take);
  return () => {
    for (const event of events) process.off(event, take);
  };
}
