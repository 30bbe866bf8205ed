import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import Module, { createRequire } from "node:module";
import { basename, dirname, join } from "node:path";
import { Script } from "node:vm";

/** A loaded CommonJS file. */
export interface CachedModule {
  readonly exports: unknown;
  /** Keeps the engine's code for the functions that have run by now for the next start, if there was none for this one. */
  keep(): void;
}

/**
 * Loads a large CommonJS file as `require` does, with the engine's code for it from an earlier start if that was kept in
 * a folder: compiling nine megabytes anew takes a third of a second. Code of another version of Node or of the file is
 * not used. A folder that cannot be written to does no harm.
 */
export function loadCached(file: string, folder: string): CachedModule {
  const { size, mtimeMs } = statSync(file);
  const name = `${basename(file)}-${process.version}-${process.arch}-${size}-${Math.floor(mtimeMs)}.cache`;
  const cache = join(folder, name);
  const cachedData = read(cache);
  const source = (Module as unknown as { wrap(source: string): string }).wrap(readFileSync(file, "utf8"));
  const script = new Script(source, { filename: file, ...(cachedData ? { cachedData } : {}) });
  const require = createRequire(file);
  const module = new Module(file);
  module.filename = file;
  const run = script.runInThisContext() as (...given: unknown[]) => void;
  run(module.exports, require, module, file, dirname(file));
  module.loaded = true;
  require.cache[file] = module;
  return {
    exports: module.exports,
    keep() {
      if (cachedData && !script.cachedDataRejected) return;
      try {
        write(folder, name, script.createCachedData());
      } catch {} // the next start compiles again
    },
  };
}

function read(path: string): Buffer | undefined {
  try {
    return readFileSync(path);
  } catch {
    return undefined;
  }
}

/** Puts the file in place in one step, in case another kernel starts just now, and removes what others it replaces. */
function write(folder: string, name: string, data: Buffer): void {
  mkdirSync(folder, { recursive: true });
  const draft = join(folder, `${name}.${process.pid}`);
  writeFileSync(draft, data);
  renameSync(draft, join(folder, name));
  for (const other of readdirSync(folder)) {
    if (other.endsWith(".cache") && other !== name) rmSync(join(folder, other), { force: true });
  }
}
