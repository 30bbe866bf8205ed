import { createRequire } from "node:module";
import { basename, join } from "node:path";
import type * as TypeScript from "@tslab/typescript-for-tslab";
import { createBuilder } from "./builder.js";
import { shareVariables } from "./live-names.js";
import { LocalFiles } from "./local-files.js";
import { pathsFor, typeRootsFor, withoutOnDemand } from "./node-types.js";
import { createResolution, type Resolution } from "./resolution.js";
import { compilerPath, packageFolder, ts } from "./typescript.js";

/** The source maps of the last cell that was turned into CommonJS: cell to module, module to CommonJS. */
export let lastMaps: { readonly first: string | undefined; readonly second: string | undefined } = {
  first: undefined,
  second: undefined,
};

const mapComment = /\n\/\/# sourceMappingURL=data:application\/json;base64,([A-Za-z0-9+/=]+)\s*$/;

function takeMap(js: string): { code: string; map: string | undefined } {
  const found = mapComment.exec(js);
  return found ? { code: js.slice(0, found.index + 1), map: found[1] } : { code: js, map: undefined };
}

/** What follows the files on disk for the compiler that was made last. */
export const disk: { files: LocalFiles; resolution: Resolution | undefined } = {
  files: new LocalFiles(),
  resolution: undefined,
};

/**
 * Puts an object in the place of the TypeScript module that the converter reads, with other compiler options: types of
 * ESM packages resolve, checks are strict, source maps are kept, `lagbook` is found from any folder, Node's larger modules
 * are read on demand, and local files are looked at instead of watched. The module's own files stay untouched.
 *
 * @param declarations what is declared before the first cell
 */
export function adaptTypeScript(declarations: string): void {
  const overrides: Record<string, unknown> = {
    createWatchCompilerHost(
      files: string[],
      options: TypeScript.CompilerOptions,
      system: TypeScript.System,
      _createProgram: unknown,
      ...rest: unknown[]
    ) {
      const adapted: TypeScript.CompilerOptions = {
        ...options,
        moduleResolution: ts.ModuleResolutionKind.Bundler,
        strict: true,
        // A notebook's callbacks are short; what they are given is known from the function they are handed to.
        noImplicitAny: false,
        inlineSourceMap: true,
        baseUrl: packageFolder,
        paths: {
          ...pathsFor(process.cwd()),
          lagbook: [join(packageFolder, "dist/src/index.d.ts")],
          "lagbook/notebook": [join(packageFolder, "dist/kernel/session/notebook.d.ts")],
        },
        types: ["node"],
        ...typeRootsFor(process.cwd()),
      };
      const host = (ts.createWatchCompilerHost as (...given: unknown[]) => TypeScript.ModuleResolutionHost)(
        files,
        adapted,
        withFirst(system, declarations),
        createBuilder,
        ...rest,
      );
      disk.files = new LocalFiles();
      disk.resolution = createResolution(host, process.cwd());
      return Object.assign(host, disk.resolution);
    },
    transpileModule(source: string, options: TypeScript.TranspileOptions) {
      const { code, map } = takeMap(source);
      const result = ts.transpileModule(shareVariables(code), {
        ...options,
        compilerOptions: { ...options.compilerOptions, inlineSourceMap: true },
      });
      const taken = takeMap(result.outputText);
      lastMaps = { first: map, second: taken.map };
      return { ...result, outputText: taken.code };
    },
    sys: Object.assign(Object.create(ts.sys), {
      readFile: (path: string, encoding?: string) => withoutOnDemand(path, ts.sys.readFile(path, encoding)),
      watchFile: (path: string, changed: (path: string, kind: number) => void) =>
        disk.files.watch(path, changed),
      watchDirectory: () => ({ close() {} }),
    }),
  };
  const thin: Record<string, unknown> = {};
  for (const key of Object.keys(ts)) {
    Object.defineProperty(thin, key, {
      enumerable: true,
      get: () => overrides[key] ?? (ts as unknown as Record<string, unknown>)[key],
    });
  }
  createRequire(import.meta.url).cache[compilerPath]!.exports = thin;
}

/**
 * The system, with declarations in the file of earlier cells when it is read for the first time: the converter makes a
 * program before it is given any, and would have to make it anew.
 */
function withFirst(system: TypeScript.System, declarations: string): TypeScript.System {
  let first = true;
  return Object.assign(Object.create(system), {
    readFile(path: string, encoding?: string) {
      const text = system.readFile(path, encoding);
      if (!first || basename(path) !== "__prev__.d.ts") return text;
      first = false;
      return text + declarations;
    },
  });
}
