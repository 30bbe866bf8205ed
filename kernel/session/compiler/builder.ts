import type * as TypeScript from "@tslab/typescript-for-tslab";
import { ts } from "./typescript.js";

type Builder = TypeScript.EmitAndSemanticDiagnosticsBuilderProgram;
type Resolved = { resolvedModules?: { forEach(visit: (found: { resolvedModule?: Target }) => void): void } };
interface Target {
  readonly resolvedFileName: string;
}

type Bind = (file: TypeScript.SourceFile, options: TypeScript.CompilerOptions) => void;

/**
 * Makes the compiler's programs. The usual builder asks a type checker, at every program, which files each file of the
 * program refers to; cells need only the local files behind the cell itself.
 */
export function createBuilder(...given: Parameters<TypeScript.CreateProgram<Builder>>): Builder {
  const builder = (ts.createAbstractBuilder as (...given: unknown[]) => Builder)(...given);
  const program = builder.getProgram();
  // The converter looks at the names of the cell without asking for a checker, which would find them.
  const { bindSourceFile } = ts as unknown as { bindSourceFile: Bind };
  for (const name of program.getRootFileNames()) {
    const file = program.getSourceFile(name);
    if (file) bindSourceFile(file, program.getCompilerOptions());
  }
  return Object.assign(builder, {
    getAllDependencies: (file: TypeScript.SourceFile) => sourcesBehind(builder.getProgram(), file),
  });
}

/** A file and the files with code, not just types, that it imports, directly or through others. */
function sourcesBehind(program: TypeScript.Program, file: TypeScript.SourceFile): string[] {
  const found = new Set([file]);
  for (const next of found) {
    (next as Resolved).resolvedModules?.forEach(({ resolvedModule }) => {
      const target = resolvedModule && program.getSourceFile(resolvedModule.resolvedFileName);
      if (target && !target.isDeclarationFile) found.add(target);
    });
  }
  return [...found].map(({ fileName }) => fileName);
}
