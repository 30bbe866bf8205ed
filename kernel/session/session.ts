import { bundleOf } from "./bundle.js";
import { type CellContext, cellContext } from "./cell-context.js";
import { type Compiled, type Compiler, createCompiler, importsOf } from "./compiler/compiler.js";
import { complete, type Surroundings } from "./completion/complete.js";
import type { Completions } from "./completion/completions.js";
import { CellExecutor } from "./executor.js";
import { type CellFailure, type CellScript, thrownFailure, typeFailure } from "./failure.js";
import { givenDeclarations, givenNames } from "./given.js";
import { guardErrors } from "./guard-errors.js";
import { guardExit } from "./guard-exit.js";
import { type Inspection, inspectAt } from "./inspect.js";
import { Interrupted, Interruption } from "./interruption.js";
import { type Completeness, isComplete } from "./is-complete.js";
import { CellModules } from "./modules.js";
import { Shown } from "./notebook.js";
import type { Bundle, Output } from "./output.js";
import { showProgress } from "./progress.js";
import { runScript, watched } from "./run-script.js";
import { Scope } from "./scope.js";
import { captureStreams } from "./streams.js";

/** Options of a session. */
export interface SessionOptions {
  /** Folder of the notebook: files and packages are found from there. */
  readonly directory: string;
  /** Receives everything that cells send. */
  emit(output: Output): void;
  /** Asks the person for a line; without it `ask` fails. Waits, blocking; undefined when interrupted. */
  readInput?(question: string, hidden: boolean): string | undefined;
  /** Whether the person has asked, from another thread, for the running cell to end. */
  stopRequested?(): boolean;
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
  /** Does what the first cell would have to, so that it need not. */
  warm(): void;
  /** Makes the next session of the installation start quicker; for when nobody waits. */
  keep(): void;
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

/** Opens a session. Takes about a second, most of it for the compiler. */
export async function createSession(options: SessionOptions): Promise<Session> {
  const before = process.cwd();
  process.chdir(options.directory);
  captureStreams();
  guardExit();
  // Deep enough that the user's own line is still among the frames when a cell function throws.
  Error.stackTraceLimit = Math.max(Error.stackTraceLimit, 60);
  const session = new OpenSession(options, createCompiler(givenDeclarations), before);
  showProgress();
  return session;
}

type Ran = { readonly value: unknown } | { readonly failure: CellFailure };

class OpenSession implements Session {
  readonly #options: SessionOptions;
  readonly #compiler: Compiler;
  readonly #modules: CellModules;
  readonly #executor: CellExecutor;
  readonly #scope = new Scope(givenNames);
  readonly #scripts = new Map<string, CellScript>();
  readonly #shown = new Set<string>();
  readonly #before: string;
  readonly #unguard: () => void;
  #declarations = givenDeclarations;
  #count = 0;
  #displays = 0;
  #runs = 0;
  #interruption = new Interruption();
  #last: CellContext | undefined;

  constructor(options: SessionOptions, compiler: Compiler, before: string) {
    this.#options = options;
    this.#compiler = compiler;
    this.#before = before;
    this.#modules = new CellModules(options.directory);
    this.#executor = new CellExecutor(options.directory, compiler.converter);
    this.#unguard = guardErrors((error, cell) => this.#tellLate(error, cell ?? this.#last));
  }

  get values(): Readonly<Record<string, unknown>> {
    return this.#scope.names;
  }

  async execute(code: string, options: ExecuteOptions = {}): Promise<ExecuteReply> {
    const { silent = false } = options;
    const counted = (options.storeHistory ?? true) && !silent;
    if (counted) this.#count++;
    const count = this.#count;
    options.started?.(count);
    const emit = options.emit ?? ((output: Output) => this.#options.emit(output));
    this.#interruption = new Interruption();
    const context = this.#context(emit, this.#interruption);
    this.#last = context;
    const run = await this.#run(code, context, `cell [${count}]`);
    const shown =
      "failure" in run || silent || run.value === undefined || run.value instanceof Shown
        ? run
        : await this.#bundle(run.value, context);
    if ("failure" in shown) {
      if (!silent) emit({ type: "error", ...shown.failure });
      return { status: "error", execution_count: count, ...shown.failure };
    }
    if ("data" in shown) {
      emit({ type: "execute_result", data: shown.data, metadata: {}, execution_count: count });
    }
    const expressions = await this.#evaluate(options.userExpressions ?? {}, context);
    return { status: "ok", execution_count: count, user_expressions: expressions };
  }

  warm(): void {
    this.#compiler.compile(this.#declarations, "0");
  }

  keep(): void {
    this.#compiler.keep();
  }

  complete(code: string, offset: number): Completions {
    return complete(this.#surroundings, code, offset);
  }

  inspect(code: string, offset: number, detail = 0): Inspection {
    return inspectAt(this.#surroundings, code, offset, detail);
  }

  get #surroundings(): Surroundings {
    const { directory } = this.#options;
    return { compiler: this.#compiler, declarations: this.#declarations, values: this.values, directory };
  }

  isComplete(code: string): Completeness {
    return isComplete(code);
  }

  interrupt(): void {
    this.#interruption.request();
  }

  close(): void {
    this.#unguard();
    this.#executor.close();
    this.#compiler.close();
    process.chdir(this.#before);
  }

  #context(emit: (output: Output) => void, interruption: Interruption): CellContext {
    return {
      emit,
      ask: (question, hidden) => {
        if (!this.#options.readInput) throw new Error("ask: there is nobody to ask here");
        const answer = this.#options.readInput(question, hidden);
        if (answer === undefined) throw new Interrupted();
        return answer;
      },
      stopRequested: () =>
        interruption.requested ||
        (interruption === this.#interruption && this.#options.stopRequested?.() === true),
      shown: this.#shown,
      nextDisplayId: () => `lagbook-${process.pid}-${++this.#displays}`,
    };
  }

  /** Compiles and runs a cell, and gives the value of its last expression, awaited. */
  async #run(code: string, context: CellContext, name: string): Promise<Ran> {
    try {
      const compiled = this.#compiler.compile(this.#declarations, code);
      if ("problems" in compiled) return { failure: typeFailure(compiled.problems, code) };
      const file = `lagbook-cell-${++this.#runs}.js`;
      this.#scripts.set(file, { source: code, name, sourceLine: compiled.sourceLine });
      this.#modules.sideOutputs(compiled.sideOutputs);
      const value = await cellContext.run(context, () => this.#call(compiled, code, file));
      return { value };
    } catch (error) {
      return { failure: thrownFailure(error, this.#scripts) };
    }
  }

  async #call(compiled: Extract<Compiled, { script: string }>, code: string, file: string): Promise<unknown> {
    const interruption = this.#interruption;
    await this.#modules.prepare(importsOf(code));
    const { require, places } = this.#modules;
    const given = { exports: this.#scope.names, require, ...places };
    const thrown = await this.#executor.run(
      () => runScript(compiled, file, given, interruption),
      compiled.style === "generator",
    );
    // A cell that fails half-way keeps the names that it has set.
    this.#declarations = compiled.declarations;
    if (thrown) throw thrown.error;
    if (compiled.lastValue === undefined) return undefined;
    const value = this.#scope.take(compiled.lastValue);
    return isThenable(value) ? interruption.orInterrupted(value) : value;
  }

  /** How a value shows; made under a watch, since a display may take its time too. */
  async #bundle(value: unknown, context: CellContext): Promise<{ data: Bundle } | { failure: CellFailure }> {
    try {
      const bundle = () => this.#interruption.orInterrupted(bundleOf(value, watched));
      return { data: await cellContext.run(context, bundle) };
    } catch (error) {
      return { failure: thrownFailure(error, this.#scripts) };
    }
  }

  async #evaluate(expressions: Readonly<Record<string, string>>, context: CellContext): Promise<Bundle> {
    const results: Bundle = {};
    for (const [name, expression] of Object.entries(expressions)) {
      const run = await this.#run(expression, context, `expression ${name}`);
      const shown = "failure" in run ? run : await this.#bundle(run.value, context);
      results[name] =
        "failure" in shown ? { status: "error", ...shown.failure } : { status: "ok", ...shown, metadata: {} };
    }
    return results;
  }

  /** Tells of an error that came when its cell no longer waited for it. */
  #tellLate(error: unknown, cell: CellContext | undefined): void {
    const text = `${thrownFailure(error, this.#scripts).traceback.join("\n")}\n`;
    if (cell) cell.emit({ type: "stream", name: "stderr", text });
    else process.stderr.write(error instanceof Error ? `${error.stack}\n` : text);
  }
}

function isThenable(value: unknown): value is PromiseLike<unknown> {
  return (
    typeof value === "object" && value !== null && typeof (value as PromiseLike<unknown>).then === "function"
  );
}
