import { createRequire } from "node:module";
import { basename, dirname, join } from "node:path";

/**
 * Modules of Node that declare nothing global. Most of their types are never looked at in a notebook, and reading all of
 * them takes longer than the rest of the compiler's start; so each is read when a cell, or another module's types, imports it.
 * By file: the modules that it declares, those with `node:` under that name only.
 */
const onDemand: Readonly<Record<string, readonly string[]>> = {
  "assert.d.ts": ["assert"],
  "assert/strict.d.ts": ["assert/strict"],
  "async_hooks.d.ts": ["async_hooks"],
  "child_process.d.ts": ["child_process"],
  "cluster.d.ts": ["cluster"],
  "constants.d.ts": ["constants"],
  "dgram.d.ts": ["dgram"],
  "diagnostics_channel.d.ts": ["diagnostics_channel"],
  "dns.d.ts": ["dns"],
  "dns/promises.d.ts": ["dns/promises"],
  "domain.d.ts": ["domain"],
  "fs.d.ts": ["fs"],
  "fs/promises.d.ts": ["fs/promises"],
  "http.d.ts": ["http"],
  "http2.d.ts": ["http2"],
  "https.d.ts": ["https"],
  "inspector.generated.d.ts": ["inspector", "inspector/promises"],
  "os.d.ts": ["os"],
  "path.d.ts": ["path", "path/posix", "path/win32"],
  "punycode.d.ts": ["punycode"],
  "querystring.d.ts": ["querystring"],
  "readline.d.ts": ["readline"],
  "readline/promises.d.ts": ["readline/promises"],
  "repl.d.ts": ["repl"],
  "sea.d.ts": ["node:sea"],
  "stream/consumers.d.ts": ["stream/consumers"],
  "stream/promises.d.ts": ["stream/promises"],
  "string_decoder.d.ts": ["string_decoder"],
  "test.d.ts": ["node:test", "node:test/reporters"],
  "tls.d.ts": ["tls"],
  "trace_events.d.ts": ["trace_events"],
  "v8.d.ts": ["v8"],
  "vm.d.ts": ["vm"],
  "wasi.d.ts": ["wasi"],
  "zlib.d.ts": ["zlib"],
};

const folder = dirname(createRequire(import.meta.url).resolve("@types/node/package.json"));

/** Where the types of each such module are, by its name with and without `node:`. */
export const nodeTypePaths: Readonly<Record<string, string[]>> = Object.fromEntries(
  Object.entries(onDemand).flatMap(([file, modules]) =>
    modules
      .flatMap((name) => (name.startsWith("node:") ? [name] : [name, `node:${name}`]))
      .map((name) => [name, [join(folder, file)]]),
  ),
);

/** The compiler's `paths` for a session in a folder: none where that folder has types of Node of its own, which are read whole. */
export function pathsFor(directory: string): Readonly<Record<string, string[]>> {
  return hasOwn(directory) ? {} : nodeTypePaths;
}

/** The compiler's `typeRoots` for a session in a folder: ours, or its own if it has types of Node. */
export function typeRootsFor(directory: string): { readonly typeRoots?: string[] } {
  return hasOwn(directory) ? {} : { typeRoots: [dirname(folder)] };
}

function hasOwn(directory: string): boolean {
  try {
    const found = createRequire(join(directory, "cell.js")).resolve("@types/node/package.json");
    return dirname(found) !== folder;
  } catch {
    return false;
  }
}

/** Comments on lines of their own; reading them takes half the time. */
const comments = /^[ \t]*\/\*\*[\s\S]*?\*\/[ \t]*\n/gm;

/**
 * The text of a file of types, without what would have everything read: the references in the index of Node's types, the
 * table of `process.getBuiltinModule`, which then gives an object of no particular type for these, and in the files that are
 * always read the comments and the imports of such modules. A global's part that is of such a type (`process.stdin`'s, say) may be anything.
 */
export function withoutOnDemand(path: string, text: string | undefined): string | undefined {
  if (text === undefined || !(path.startsWith(folder) || path.includes("/undici-types/"))) return text;
  if (basename(path) === "index.d.ts") {
    return text.replace(/^\/\/\/ <reference path="(?:\.\.\/)?([^"]+)" \/>$/gm, (line, file) =>
      file in onDemand ? "" : line,
    );
  }
  if (path.slice(folder.length + 1) in onDemand) return text;
  const unread = text
    .replace(comments, "")
    .replace(/^( *import .* from )["']([^"']+)["'];?$/gm, (line, head, name) =>
      name in nodeTypePaths ? `${head}"not-read:${name}";` : line,
    );
  if (basename(path) !== "process.d.ts") return unread;
  return unread.replace(/^ *"([^"]+)": typeof import\("[^"]+"\);$/gm, (line, name) =>
    name in nodeTypePaths ? "" : line,
  );
}
