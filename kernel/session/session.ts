import { createRequire } from "node:module";
import { bundleOf } from "./bundle.js";
import { type CellContext, cellContext } from "./cell-context.js";
import { type Compiler, createCompiler, importsOf } from "./compiler/compiler.js";
import { type Completions, complete } from "./complete.js";
import { type CellFailure, type CellScript, thrownFailure, typeFailure } from "./failure.js";
import { guardExit } from "./guard-exit.js";
import { type Inspection, inspectAt } from "./inspect.js";
import { type Completeness, isComplete } from "./is-complete.js";
import { CellModules, cellNames } from "./modules.js";
import type { Bundle, Output } from "./output.js";
import { showProgress } from "./progress.js";
import { runScript } from "./run-script.js";
import { captureStreams } from "./streams.js";

/** Options of a session. */
export interface SessionOptions {
  /** Folder of the notebook: files and packages are found from there. */
  readonly directory: string;
  /** Receives everything that cells send. */
  emit(output: Output): void;
  /** Asks the person for a line; without it `ask` fails. Waits, blocking. */
  readInput?(question: string, hidden: boolean): string;
}

/** Options of one execution. */
export interface ExecuteOptions {
  /** Show no result and count nothing. */
  readonly silent?: boolean;
  /** Count the cell. Default true. */
  readonly storeHistory?: boolean;
  /** Expressions to evaluate after the cell, by name. */
  readonly userExpressions?: Readonly<Record<string, string>>;
  /** Where this cell's output goes, now and when it comes after the cell has ended; else the session's `emit`. */
  emit?(output: Output): void;
  /** Called with the cell's number before it runs. */
  started?(executionCount: number): void;
}

/** How a cell ended. */
export interface ExecuteReply {
  readonly status: "ok" | "error";
  readonly execution_count: number;
  readonly ename?: string;
  readonly evalue?: string;
  readonly traceback?: string[];
  readonly user_expressions?: Bundle;
}

/** One user's session: cells compiled and run in order, their names shared. */
export interface Session {
  execute(code: string, options?: ExecuteOptions): Promise<ExecuteReply>;
  /** Completions at an offset in UTF-16 units. */
  complete(code: string, offset: number): Completions;
  inspect(code: string, offset: number, detail?: number): Inspection;
  isComplete(code: string): Completeness;
  /** Ends a pending await; a synchronous loop is ended by the process's interrupt signal. */
  interrupt(): void;
  /** Names of the session and their values, as they are now. */
  readonly values: Readonly<Record<string, unknown>>;
  close(): void;
}

const require = createRequire(import.meta.url);

/** Opens a session. Takes about a second, most of it for the compiler. */
export async function createSession(options: SessionOptions): Promise<Session> {
  const before = process.cwd();
  process.chdir(options.directory);
  captureStreams();
  guardExit();
  // Deep enough that the user's own line is still among the frames when a cell function throws.
  Error.stackTraceLimit = Math.max(Error.stackTraceLimit, 60);
  const session = new OpenSession(options, createCompiler(), before);
  await session.prime();
  return session;
}

class OpenSession implements Session {
  readonly #options: SessionOptions;
  readonly #compiler: Compiler;
  readonly #modules: CellModules;
  readonly #executor: import("tslab/dist/executor.js").Executor;
  readonly #scripts = new Map<string, CellScript>();
  readonly #shown = new Set<string>();
  readonly #before: string;
  #declarations = "";
  #count = 0;
  #displays = 0;
  #runs = 0;
  #output = "";
  #awaits = false;
  #thrown: { error: unknown } | undefined;
  #rejectPending: ((error: Error) => void) | undefined;

  constructor(options: SessionOptions, compiler: Compiler, before: string) {
    this.#options = options;
    this.#compiler = compiler;
    this.#before = before;
    this.#modules = new CellModules(options.directory);
    const { createExecutor } = require("tslab/dist/executor.js") as typeof import("tslab/dist/executor.js");
    // The executor asks for a conversion; the cell has been compiled before and only its call is handed over.
    const converter = Object.assign(Object.create(compiler.converter), {
      convert: () => ({ output: this.#output, hasToplevelAwait: this.#awaits, diagnostics: [] }),
    });
    this.#executor = createExecutor(
      options.directory,
      { node: converter, browser: converter, close: () => {} },
      { log: () => {}, error: (error: unknown) => (this.#thrown = { error }) },
    );
  }

  get values(): Readonly<Record<string, unknown>> {
    return this.#executor.locals;
  }

  /** Runs the hidden first cell that brings the cell functions into scope. */
  async prime(): Promise<void> {
    const imports = cellNames.map(
      ({ module, names }) => `import { ${names.join(", ")} } from ${JSON.stringify(module)};`,
    );
    const reply = await this.execute(imports.join("\n"), {
      silent: true,
      storeHistory: false,
      emit: () => {},
    });
    if (reply.status === "error") throw new Error(`the cell functions cannot be loaded: ${reply.evalue}`);
    showProgress();
  }

  async execute(code: string, options: ExecuteOptions = {}): Promise<ExecuteReply> {
    const { silent = false } = options;
    const counted = (options.storeHistory ?? true) && !silent;
    if (counted) this.#count++;
    const count = this.#count;
    options.started?.(count);
    const emit = options.emit ?? ((output: Output) => this.#options.emit(output));
    const context = this.#context(emit);
    const run = await this.#run(code, context, `cell [${count}]`);
    if ("failure" in run) return this.#fail(run.failure, count, emit, silent);
    if (!silent && run.value !== undefined) {
      const data = await cellContext
        .run(context, () => this.#orInterrupted(bundleOf(run.value)))
        .catch(() => undefined);
      if (data) emit({ type: "execute_result", data, metadata: {}, execution_count: count });
    }
    const expressions = await this.#evaluate(options.userExpressions ?? {}, context);
    return { status: "ok", execution_count: count, user_expressions: expressions };
  }

  complete(code: string, offset: number): Completions {
    return complete(this.#compiler, this.#declarations, this.values, code, offset);
  }

  inspect(code: string, offset: number, detail = 0): Inspection {
    return inspectAt(this.#compiler, this.#declarations, code, offset, detail);
  }

  isComplete(code: string): Completeness {
    return isComplete(code);
  }

  interrupt(): void {
    this.#executor.interrupt();
    this.#rejectPending?.(new Error("Interrupted asynchronously"));
  }

  close(): void {
    this.#executor.close();
    this.#compiler.close();
    process.chdir(this.#before);
  }

  #context(emit: (output: Output) => void): CellContext {
    return {
      emit,
      ask: (question, hidden) => {
        if (this.#options.readInput) return this.#options.readInput(question, hidden);
        throw new Error("ask: there is nobody to ask here");
      },
      shown: this.#shown,
      nextDisplayId: () => `lagbook-${process.pid}-${++this.#displays}`,
    };
  }

  #fail(failure: CellFailure, count: number, emit: (output: Output) => void, silent: boolean): ExecuteReply {
    if (!silent) emit({ type: "error", ...failure });
    return { status: "error", execution_count: count, ...failure };
  }

  /** Compiles and runs a cell, and gives the value of its last expression, awaited. */
  async #run(
    code: string,
    context: CellContext,
    name: string,
  ): Promise<{ value: unknown } | { failure: CellFailure }> {
    const compiled = this.#compiler.compile(this.#declarations, code);
    if ("problems" in compiled) return { failure: typeFailure(compiled.problems, code) };
    const exports = this.#executor.locals;
    const file = `lagbook-cell-${++this.#runs}.js`;
    this.#scripts.set(file, { source: code, name, sourceLine: compiled.sourceLine });
    this.#modules.sideOutputs(compiled.sideOutputs);
    try {
      await this.#modules.prepare(importsOf(code));
    } catch (error) {
      return { failure: thrownFailure(error, this.#scripts) };
    }
    this.#awaits = compiled.style !== "plain";
    this.#output = `return globalThis[Symbol.for("lagbook.run")]();`;
    (globalThis as Record<symbol, unknown>)[Symbol.for("lagbook.run")] = () =>
      runScript(compiled, file, exports, this.#modules.load);
    this.#thrown = undefined;
    const ok = await cellContext.run(context, () => this.#executor.execute("cell"));
    // A cell that failed half-way keeps the names that it had set.
    if (compiled.declarations !== "" || ok) this.#declarations = compiled.declarations;
    if (!ok) return { failure: thrownFailure(this.#thrown!.error, this.#scripts) };
    if (compiled.lastValue === undefined) return { value: undefined };
    const value = exports[compiled.lastValue];
    delete exports[compiled.lastValue];
    if (!isThenable(value)) return { value };
    try {
      return { value: await cellContext.run(context, () => this.#orInterrupted(value)) };
    } catch (error) {
      return { failure: thrownFailure(error, this.#scripts) };
    }
  }

  /** Waits for a value unless the interrupt comes first. */
  async #orInterrupted<V>(value: PromiseLike<V>): Promise<V> {
    const interrupted = new Promise<never>((_, reject) => {
      this.#rejectPending = reject;
    });
    try {
      return await Promise.race([value, interrupted]);
    } finally {
      this.#rejectPending = undefined;
    }
  }

  async #evaluate(expressions: Readonly<Record<string, string>>, context: CellContext): Promise<Bundle> {
    const results: Bundle = {};
    for (const [name, expression] of Object.entries(expressions)) {
      const run = await this.#run(expression, context, `expression ${name}`);
      results[name] =
        "failure" in run
          ? { status: "error", ...run.failure }
          : { status: "ok", data: await bundleOf(run.value), metadata: {} };
    }
    return results;
  }
}

function isThenable(value: unknown): value is PromiseLike<unknown> {
  return (
    typeof value === "object" && value !== null && typeof (value as PromiseLike<unknown>).then === "function"
  );
}
