import { createRequire } from "node:module";
import { dirname, isAbsolute, join } from "node:path";
import { pathToFileURL } from "node:url";
import { Script } from "node:vm";
import * as lagbook from "../../src/index.js";
import * as notebook from "./notebook.js";

const ours: Readonly<Record<string, unknown>> = { lagbook, "lagbook/notebook": notebook };

/**
 * The `require` of cells: Lagbook itself from any folder, packages from the notebook's folder. Packages that only a
 * real import can load (their modules await at the top level) are imported beforehand by `prepare`.
 */
export class CellModules {
  readonly #require: NodeJS.Require;
  readonly #imported = new Map<string, unknown>();
  readonly #directory: string;
  /** CommonJS of local TypeScript files, by the path of their JavaScript. */
  readonly #sources = new Map<string, string>();
  readonly #loaded = new Map<string, { exports: unknown }>();

  constructor(directory: string) {
    this.#directory = directory;
    this.#require = createRequire(join(directory, "cell.js"));
  }

  /** Loads what `require` cannot. */
  async prepare(specifiers: readonly string[]): Promise<void> {
    for (const specifier of specifiers) {
      if (specifier in ours || this.#imported.has(specifier)) continue;
      try {
        this.#require(specifier);
      } catch (error) {
        const { code } = error as NodeJS.ErrnoException;
        if (
          code === "ERR_REQUIRE_ASYNC_MODULE" ||
          code === "ERR_REQUIRE_ESM" ||
          code === "ERR_PACKAGE_PATH_NOT_EXPORTED"
        ) {
          await this.#import(specifier);
        }
        // Any other failure shows when the cell itself asks for the module.
      }
    }
  }

  async #import(specifier: string): Promise<void> {
    const target =
      isAbsolute(specifier) || specifier.startsWith(".") ? join(this.#directory, specifier) : undefined;
    const href = target ? pathToFileURL(target).href : pathToFileURL(this.#resolve(specifier)).href;
    this.#imported.set(specifier, await import(href));
  }

  /** The file that an import of a package leads to, which `require.resolve` cannot tell when only imports are exported. */
  #resolve(specifier: string): string {
    const { resolve } = createRequire(join(this.#directory, "cell.js"));
    try {
      return resolve(specifier);
    } catch {
      const [scope, name] = specifier.split("/");
      const packageName = scope!.startsWith("@") ? `${scope}/${name}` : scope!;
      for (const folder of resolve.paths(specifier) ?? []) {
        const file = join(folder, packageName, "package.json");
        try {
          const { exports, module, main } = this.#require(file);
          const entry = entryOf(exports) ?? module ?? main ?? "index.js";
          return join(folder, packageName, entry);
        } catch {}
      }
      throw new Error(`Cannot find module '${specifier}' from ${this.#directory}`);
    }
  }

  /** Takes in the compiled forms of local TypeScript files; a changed one is loaded anew. */
  sideOutputs(outputs: readonly { path: string; data: string }[]): void {
    for (const { path, data } of outputs) {
      this.#sources.set(path, data);
      this.#loaded.delete(path);
    }
  }

  /** What a cell gets for a module name. */
  load = (specifier: string): unknown => this.#loadFrom(this.#directory, specifier);

  #loadFrom(folder: string, specifier: string): unknown {
    if (specifier in ours) return ours[specifier];
    if (this.#imported.has(specifier)) return this.#imported.get(specifier);
    const path = this.#sourcePath(folder, specifier);
    return path === undefined ? createRequire(join(folder, "cell.js"))(specifier) : this.#loadSource(path);
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

function entryOf(exports: unknown): string | undefined {
  if (typeof exports === "string") return exports;
  if (typeof exports !== "object" || exports === null) return undefined;
  const map = exports as Record<string, unknown>;
  const root = map["."] ?? map["import"] ?? map["node"] ?? map["default"];
  return root === exports ? undefined : entryOf(root);
}

/** Names that cells have without importing them, by the module that they come from. */
export const cellNames: readonly { module: string; names: readonly string[] }[] = [
  { module: "lagbook", names: Object.keys(lagbook) },
  { module: "lagbook/notebook", names: Object.keys(notebook) },
];
