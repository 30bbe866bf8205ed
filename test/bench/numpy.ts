import { type ChildProcess, spawn, spawnSync } from "node:child_process";
import { existsSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { createInterface } from "node:readline";
import { places } from "../../kernel/install/index.js";
import { root } from "../root.js";

/** A Python that can import `module`, or undefined. */
export function pythonWith(module: string): string | undefined {
  return [places().python, "python3"].find(
    (python) =>
      (python === "python3" || existsSync(python)) &&
      spawnSync(python, ["-c", `import ${module}`], { stdio: "ignore" }).status === 0,
  );
}

/** A Python process that keeps the bench's data and times one thing at a time when asked. */
export class Numpy {
  readonly version: string;
  readonly #child: ChildProcess;
  readonly #lines: AsyncIterator<string>;

  /** Starts it; undefined where there is no numpy. */
  static start(): Numpy | undefined {
    const python = pythonWith("numpy");
    return python ? new Numpy(python) : undefined;
  }

  private constructor(python: string) {
    this.version = spawnSync(python, ["-c", "import numpy; print(numpy.__version__)"], {
      encoding: "utf8",
    }).stdout.trim();
    this.#child = spawn(python, [join(root, "test", "bench", "numpy_side.py")], {
      stdio: ["pipe", "pipe", "inherit"],
    });
    this.#lines = createInterface({ input: this.#child.stdout! })[Symbol.asyncIterator]();
  }

  /** Hands an array over by a file of raw float64. */
  async give(name: string, values: Float64Array, shape: readonly number[], folder: string): Promise<void> {
    const file = join(folder, `${name}.f64`);
    writeFileSync(file, new Uint8Array(values.buffer, values.byteOffset, values.byteLength));
    await this.ask({ task: "take", name, file, shape });
  }

  /** Runs a task once. @returns seconds, as it measured them itself, and whatever else it tells */
  async ask(request: Record<string, unknown>): Promise<{ seconds: number; value?: number[] }> {
    this.#child.stdin!.write(`${JSON.stringify(request)}\n`);
    const { value, done } = await this.#lines.next();
    if (done) throw new Error("the Python side of the bench has ended");
    return JSON.parse(value) as { seconds: number };
  }

  close(): void {
    this.#child.stdin!.end();
  }
}
