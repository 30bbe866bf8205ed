import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { constants, Script } from "node:vm";
import { ownModules as ours } from "./given.js";

/** Codes of "`require` cannot load this, but a real import may". */
const importable = new Set([
  "ERR_REQUIRE_ASYNC_MODULE",
  "ERR_REQUIRE_ESM",
  "ERR_REQUIRE_CYCLE_MODULE",
  "ERR_PACKAGE_PATH_NOT_EXPORTED",
]);

/**
 * The `require` of cells: Lagbook itself from any folder, packages from the notebook's folder. Packages that only a
 * real import can load (their modules await at the top level, or they export nothing to `require`) are imported
 * beforehand by `prepare`.
 */
export class CellModules {
  readonly #require: NodeJS.Require;
  readonly #import: (specifier: string) => Promise<unknown>;
  readonly #imported = new Map<string, unknown>();
  readonly #directory: string;
  /** CommonJS of local TypeScript files, by the path of their JavaScript. */
  readonly #sources = new Map<string, string>();
  readonly #loaded = new Map<string, { exports: unknown }>();
  /** Where cells are, as a CommonJS module knows it. */
  readonly places: { readonly __dirname: string; readonly __filename: string };

  constructor(directory: string) {
    const file = join(directory, "cell.js");
    this.#directory = directory;
    this.places = { __dirname: directory, __filename: file };
    this.#require = createRequire(file);
    this.#import = importFrom(file);
  }

  /** Loads what `require` cannot. */
  async prepare(specifiers: readonly string[]): Promise<void> {
    for (const specifier of specifiers) {
      if (specifier in ours || this.#imported.has(specifier)) continue;
      try {
        this.load(specifier);
      } catch (error) {
        const code = (error as NodeJS.ErrnoException | undefined)?.code;
        if (code && importable.has(code)) this.#imported.set(specifier, await this.#import(specifier));
        // Any other failure shows when the cell itself asks for the module.
      }
    }
  }

  /** Takes in the compiled forms of local TypeScript files. When one has changed, all are loaded anew: others may use it. */
  sideOutputs(outputs: readonly { path: string; data: string }[]): void {
    if (outputs.some(({ path }) => this.#sources.has(path))) this.#loaded.clear();
    for (const { path, data } of outputs) this.#sources.set(path, data);
  }

  /** The `require` of cells; `prepared` is what a dynamic import of a computed name waits for. */
  get require(): ((specifier: string) => unknown) & { resolve: unknown; prepared: unknown } {
    const prepared = async (specifier: string) => {
      await this.prepare([specifier]);
      return this.load(specifier);
    };
    return Object.assign(this.load, { resolve: this.#require.resolve, prepared });
  }

  /** What a cell gets for a module name. */
  load = (specifier: string): unknown => this.#loadFrom(this.#directory, specifier);

  #loadFrom(folder: string, specifier: string): unknown {
    if (specifier in ours) return ours[specifier];
    if (this.#imported.has(specifier)) return this.#imported.get(specifier);
    const path = this.#sourcePath(folder, specifier);
    if (path !== undefined) return this.#loadSource(path);
    return (folder === this.#directory ? this.#require : createRequire(join(folder, "cell.js")))(specifier);
  }

  #sourcePath(folder: string, specifier: string): string | undefined {
    if (!specifier.startsWith(".")) return undefined;
    const base = join(folder, specifier);
    return [base, `${base}.js`, join(base, "index.js")].find((path) => this.#sources.has(path));
  }

  #loadSource(path: string): unknown {
    const known = this.#loaded.get(path);
    if (known) return known.exports;
    const module = { exports: {} as unknown };
    this.#loaded.set(path, module);
    const body = new Script(`(function(exports, require, module) {${this.#sources.get(path)}\n})`, {
      filename: path,
    });
    const run = body.runInThisContext() as (exports: unknown, require: unknown, module: unknown) => void;
    run(module.exports, (specifier: string) => this.#loadFrom(dirname(path), specifier), module);
    return module.exports;
  }
}

/** A real import that looks for packages from a file's folder. */
function importFrom(file: string): (specifier: string) => Promise<unknown> {
  const script = new Script("(specifier) => import(specifier)", {
    filename: file,
    importModuleDynamically: constants.USE_MAIN_CONTEXT_DEFAULT_LOADER,
  });
  const load = script.runInThisContext() as (specifier: string) => Promise<unknown>;
  let warned = false;
  return (specifier) => {
    if (warned) return load(specifier);
    // Node warns once that this may change, in the middle of the user's cell.
    warned = true;
    const { emitWarning } = process;
    process.emitWarning = () => {};
    try {
      return load(specifier);
    } finally {
      process.emitWarning = emitWarning;
    }
  };
}
