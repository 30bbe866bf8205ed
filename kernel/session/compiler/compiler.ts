import { createRequire, SourceMap } from "node:module";
import { adaptTypeScript, disk, lastMaps } from "./adapt.js";
import { carry, globalBlocks } from "./carried.js";
import type { CompletionInfo, Converter, Diagnostic } from "./converter.js";
import { applyEdits, type Rewritten } from "./edits.js";
import { plainOutput } from "./plain-output.js";
import { annotateAny, prepare, withoutExports } from "./rewrite.js";
import { inSteps } from "./steps.js";
import { keepCompiled, ts } from "./typescript.js";

/** A problem that the type checker found in a cell. */
export interface Problem {
  readonly message: string;
  /** 0-based line and character in the user's source. */
  readonly line: number;
  readonly character: number;
  readonly length: number;
  /** File it is in, when it is not the cell. */
  readonly file?: string;
}

/** A cell compiled: its script, or what is wrong with it. */
export type Compiled =
  | { readonly problems: readonly Problem[] }
  | {
      /** CommonJS body that reads `exports` and `require`; a generator's body when `style` is "generator". */
      readonly script: string;
      readonly style: "plain" | "generator";
      /** Property of `exports` that holds the last expression's value. */
      readonly lastValue: string | undefined;
      /** Declarations of all names so far, for the next cell. */
      readonly declarations: string;
      /** CommonJS of local TypeScript files that the cell imports. */
      readonly sideOutputs: readonly { path: string; data: string }[];
      /** 0-based line in the user's source of a 0-based line of the script, where known. */
      sourceLine(line: number, character: number): number | undefined;
    };

/** Turns TypeScript cells into JavaScript; the one place that knows the compiler. */
export interface Compiler {
  /** The converter in the form that tslab's executor takes, whose `convert` returns what `compile` last made. */
  readonly converter: Converter;
  compile(declarations: string, source: string): Compiled;
  /** Undefined where the compiler has no answer. */
  complete(declarations: string, source: string, offset: number): CompletionInfo | undefined;
  inspect(declarations: string, source: string, offset: number): ReturnType<Converter["inspect"]> | undefined;
  /** Makes the next compiler start quicker; takes a moment. */
  keep(): void;
  close(): void;
}

/** Codes of "the type of this name cannot be written down": a declaration file's trouble, not the user's. */
const unwritable = (code: number) => code === 2742 || code === 7056 || (code >= 4020 && code <= 4118);

/**
 * A compiler for one session, with the notebook's folder as the present one. Takes the better part of a second.
 *
 * @param declarations what is declared before the first cell, and given to `compile` with it
 */
export function createCompiler(declarations = ""): Compiler {
  adaptTypeScript(declarations);
  const require = createRequire(import.meta.url);
  const { createConverter } = require("tslab/dist/converter.js") as typeof import("tslab/dist/converter.js");
  const converter = createConverter() as unknown as Converter;
  const globals = new Map<string, string>();
  return {
    converter,
    compile: (declarations, source) => compile(converter, globals, declarations, source),
    complete: (declarations, source, offset) =>
      answered(() => converter.complete(declarations, forServices(source), offset)),
    inspect: (declarations, source, offset) =>
      answered(() => converter.inspect(declarations, forServices(source), offset)),
    keep: keepCompiled,
    close: () => converter.close(),
  };
}

/** A cell as completion and inspection see it: place for place the user's. */
function forServices(source: string): string {
  return applyEdits(source, withoutExports(source)).text;
}

/** The compiler's services give up on some unfinished text. */
function answered<A>(ask: () => A): A | undefined {
  try {
    return ask();
  } catch {
    return undefined;
  }
}

/** Codes of "this module, or what is imported from it, is not there". */
const absent = new Set([2305, 2306, 2307, 2614, 2724, 7016]);

function compile(
  converter: Converter,
  globals: Map<string, string>,
  declarations: string,
  source: string,
): Compiled {
  disk.files.look();
  const { edits: cuts, blocks, names } = globalBlocks(source);
  if (blocks !== "") {
    // A module beside the cell, so that what it adds to is not taken for names of earlier cells. It replaces one that
    // declared the same names.
    const module = globals.get(names) ?? `lagbook_globals_${globals.size}`;
    globals.set(names, module);
    const wrong = converter.addModule(module, blocks);
    if (wrong.length > 0) {
      converter.addModule(module, "");
      return { problems: problemsOf(wrong.map(inCell), applyEdits(source, []), source) };
    }
  }
  const edits = [...cuts, ...prepare(source)];
  let cell = applyEdits(source, edits);
  let converted = converter.convert(declarations, cell.text);
  const untypable = converted.diagnostics.filter(({ code }) => unwritable(code));
  if (untypable.length > 0 && untypable.length === converted.diagnostics.length) {
    const offsets = untypable.map(({ start }) => cell.original(start.offset));
    cell = applyEdits(source, [...edits, ...annotateAny(source, offsets)]);
    converted = converter.convert(declarations, cell.text);
  }
  // The module may be there when the cell is run again.
  if (disk.resolution) disk.resolution.stale = converted.diagnostics.some(({ code }) => absent.has(code));
  if (converted.diagnostics.length > 0) return { problems: problemsOf(converted.diagnostics, cell, source) };
  const { script, style } = inSteps(plainOutput(converted.output ?? ""));
  const maps = lastMaps;
  return {
    script,
    style,
    lastValue: converted.lastExpressionVar,
    declarations: carry(declarations, converted.declOutput ?? ""),
    sideOutputs: converted.sideOutputs ?? [],
    sourceLine: (line, character) => sourceLine(maps, line, character),
  };
}

/** Lines of the cell are one less than those of the compiled file, which begins with a line of the converter's own. */
function sourceLine(maps: typeof lastMaps, line: number, character: number): number | undefined {
  const decode = (map: string | undefined) =>
    map === undefined ? undefined : new SourceMap(JSON.parse(Buffer.from(map, "base64").toString("utf8")));
  const second = decode(maps.second)?.findEntry(line, character);
  if (!second || !("originalLine" in second)) return undefined;
  const first = decode(maps.first)?.findEntry(second.originalLine, second.originalColumn);
  if (!first || !("originalLine" in first)) return undefined;
  return first.originalLine - 1;
}

function problemsOf(diagnostics: readonly Diagnostic[], cell: Rewritten, source: string): Problem[] {
  const problems = diagnostics.map((diagnostic): Problem => {
    const start = diagnostic.fileName ? diagnostic.start.offset : cell.original(diagnostic.start.offset);
    const end = diagnostic.fileName ? diagnostic.end.offset : cell.original(diagnostic.end.offset);
    const place = diagnostic.fileName
      ? { line: diagnostic.start.line, character: diagnostic.start.character }
      : placeOf(source, start);
    return {
      message: diagnostic.messageText,
      ...place,
      length: Math.max(1, end - start),
      ...(diagnostic.fileName ? { file: diagnostic.fileName } : {}),
    };
  });
  // A chain of reasons comes as several diagnostics at one place: the first says it, the rest indent under it.
  return problems.filter(
    (problem, i) =>
      !problems.slice(0, i).some((other) => other.line === problem.line && other.message === problem.message),
  );
}

function inCell({ fileName: _, ...diagnostic }: Diagnostic): Diagnostic {
  return diagnostic as Diagnostic;
}

function placeOf(source: string, offset: number): { line: number; character: number } {
  const before = source.slice(0, offset);
  const line = before.split("\n").length - 1;
  return { line, character: offset - (before.lastIndexOf("\n") + 1) };
}

/** Modules that a source imports, as written. */
export function importsOf(source: string): string[] {
  return ts.preProcessFile(source, true, true).importedFiles.map(({ fileName }) => fileName);
}
