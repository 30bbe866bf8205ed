import type * as TypeScript from "@tslab/typescript-for-tslab";
import { ts } from "./typescript.js";

/** A cell's source as it is compiled, and where each place in it came from. */
export interface Rewritten {
  readonly text: string;
  /** Offset in the user's source of an offset in `text`. */
  original(offset: number): number;
  /** Offset in `text` of an offset in the user's source. */
  rewritten(offset: number): number;
}

interface Edit {
  readonly at: number;
  readonly removed: number;
  readonly added: string;
}

/** Applies edits (none overlapping) to a source. */
export function applyEdits(source: string, edits: readonly Edit[]): Rewritten {
  const sorted = [...edits].sort((a, b) => a.at - b.at);
  let text = "";
  let at = 0;
  for (const edit of sorted) {
    text += source.slice(at, edit.at) + edit.added;
    at = edit.at + edit.removed;
  }
  text += source.slice(at);
  return {
    text,
    original(offset) {
      let shift = 0;
      for (const edit of sorted) {
        const start = edit.at + shift;
        if (offset < start) break;
        if (offset < start + edit.added.length) return edit.at;
        shift += edit.added.length - edit.removed;
      }
      return offset - shift;
    },
    rewritten(offset) {
      let shift = 0;
      for (const edit of sorted) {
        if (edit.at + edit.removed > offset) break;
        shift += edit.added.length - edit.removed;
      }
      return offset + shift;
    },
  };
}

/**
 * Works around what the converter does not take: `export` before a declaration is blanked out (a cell's names are
 * shared anyway), and the shorthand `{ n }` becomes `{ n: n }`, since a name of an earlier cell is a property there.
 */
export function prepare(source: string): readonly Edit[] {
  const file = ts.createSourceFile("cell.ts", source, ts.ScriptTarget.Latest, true, ts.ScriptKind.TS);
  const edits: Edit[] = [];
  for (const statement of file.statements) {
    if (!ts.canHaveModifiers(statement)) continue;
    for (const modifier of ts.getModifiers(statement) ?? []) {
      if (modifier.kind !== ts.SyntaxKind.ExportKeyword && modifier.kind !== ts.SyntaxKind.DefaultKeyword)
        continue;
      const start = modifier.getStart(file);
      edits.push({ at: start, removed: modifier.end - start, added: " ".repeat(modifier.end - start) });
    }
  }
  const visit = (node: TypeScript.Node): void => {
    if (
      ts.isShorthandPropertyAssignment(node) &&
      !node.objectAssignmentInitializer &&
      !isTarget(node.parent)
    ) {
      edits.push({ at: node.name.end, removed: 0, added: `: ${node.name.text}` });
    }
    ts.forEachChild(node, visit);
  };
  visit(file);
  return edits;
}

/** Whether an object literal is the target of a destructuring assignment. */
function isTarget(literal: TypeScript.Node): boolean {
  const { parent } = literal;
  return (
    ts.isBinaryExpression(parent) &&
    parent.left === literal &&
    parent.operatorToken.kind === ts.SyntaxKind.EqualsToken
  );
}

/** Annotates the declared names at these offsets with `any`: their own types cannot be written down. */
export function annotateAny(source: string, offsets: readonly number[]): readonly Edit[] {
  const file = ts.createSourceFile("cell.ts", source, ts.ScriptTarget.Latest, true, ts.ScriptKind.TS);
  const edits: Edit[] = [];
  const visit = (node: TypeScript.Node): void => {
    const named = ts.isVariableDeclaration(node) && ts.isIdentifier(node.name) && !node.type;
    if (named && offsets.includes(node.name.getStart(file)))
      edits.push({ at: node.name.end, removed: 0, added: ": any" });
    ts.forEachChild(node, visit);
  };
  visit(file);
  return edits;
}

/**
 * Turns the awaits at the top level of a compiled cell into yields, so that each stretch between two of them can be
 * run, and interrupted, on its own. Undefined where a top-level `for await` leaves no way to do that.
 */
export function awaitsToYields(js: string): string | undefined {
  // Only in a module is a top-level `await (x)` an await and not the call of a function of that name.
  const module = `${js}\nexport {};`;
  const file = ts.createSourceFile("cell.js", module, ts.ScriptTarget.Latest, true, ts.ScriptKind.JS);
  const edits: Edit[] = [];
  let loop = false;
  const visit = (node: TypeScript.Node): void => {
    if (ts.isFunctionLike(node) || ts.isClassStaticBlockDeclaration(node)) return;
    if (ts.isForOfStatement(node) && node.awaitModifier) loop = true;
    if (ts.isAwaitExpression(node)) {
      const start = node.getStart(file);
      edits.push({ at: start, removed: 5, added: "(yield" }, { at: node.end, removed: 0, added: ")" });
    }
    ts.forEachChild(node, visit);
  };
  visit(file);
  return loop ? undefined : applyEdits(js, edits).text;
}
