import { cellContext } from "./cell-context.js";

let guarded = false;

/** Keeps a cell from ending the process under the notebook. */
export function guardExit(): void {
  if (guarded) return;
  guarded = true;
  const exit = process.exit.bind(process);
  process.exit = ((code?: number) => {
    if (!cellContext.getStore()) return exit(code);
    throw new Error("process.exit is not for cells: shut the kernel down from the notebook's menu");
  }) as typeof process.exit;
}
