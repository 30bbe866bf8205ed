import { normalize, sep } from "node:path";
import type * as TypeScript from "@tslab/typescript-for-tslab";
import { packageFolder, ts } from "./typescript.js";

/** How the compiler finds the files of imports. */
export interface Resolution {
  readonly resolveModuleNameLiterals: NonNullable<TypeScript.CompilerHost["resolveModuleNameLiterals"]>;
  readonly hasInvalidatedResolutions: (path: TypeScript.Path) => boolean;
  /** Imports of cells and local files are to be looked up anew, also where nothing in their text has changed. */
  stale: boolean;
}

/**
 * Resolution without watching folders: packages' own imports are resolved once, those of cells and of files beside the
 * notebook whenever they are compiled, so that a file just written or a package just installed is found.
 */
export function createResolution(host: TypeScript.ModuleResolutionHost, directory: string): Resolution {
  const cache = ts.createModuleResolutionCache(directory, (name) => name);
  const resolution: Resolution = {
    stale: false,
    hasInvalidatedResolutions: (path) => resolution.stale && isLocal(path),
    resolveModuleNameLiterals: (literals, containing, redirected, options, file) =>
      literals.map((literal) => {
        if (literal.text.startsWith("not-read:")) return { resolvedModule: undefined };
        const mode = ts.getModeForUsageLocation(file, literal);
        return ts.resolveModuleName(
          literal.text,
          containing,
          options,
          host,
          isLocal(containing) ? undefined : cache,
          redirected,
          mode,
        );
      }),
  };
  return resolution;
}

/** Whether a file is the user's: a cell, or one beside the notebook. */
export function isLocal(path: string): boolean {
  const file = normalize(path);
  return !file.includes(`${sep}node_modules${sep}`) && !file.startsWith(`${packageFolder}${sep}dist${sep}`);
}
