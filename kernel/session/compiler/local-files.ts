import { statSync } from "node:fs";
import { isLocal } from "./resolution.js";
import { ts } from "./typescript.js";

type Changed = (path: string, kind: number) => void;

/**
 * Files beside the notebook that cells import. They are looked at before a cell is compiled instead of being watched:
 * watching takes a handle for every file that the compiler reads, and may tell of a change too late.
 */
export class LocalFiles {
  readonly #known = new Map<string, { stamp: string; changed: Changed }>();

  /** Stands for the compiler's watch of a file. */
  watch(path: string, changed: Changed): { close(): void } {
    if (!isLocal(path)) return { close() {} };
    this.#known.set(path, { stamp: stampOf(path), changed });
    return { close: () => void this.#known.delete(path) };
  }

  /** Tells the compiler of every file that is not as it was. */
  look(): void {
    for (const [path, known] of [...this.#known]) {
      const stamp = stampOf(path);
      if (stamp === known.stamp) continue;
      const { Changed, Deleted } = ts.FileWatcherEventKind;
      known.stamp = stamp;
      known.changed(path, stamp === "" ? Deleted : Changed);
    }
  }
}

function stampOf(path: string): string {
  const stat = statSync(path, { throwIfNoEntry: false });
  return stat ? `${stat.mtimeMs} ${stat.size}` : "";
}
