import type * as TypeScript from "@tslab/typescript-for-tslab";
import type { Edit } from "./edits.js";
import { ts } from "./typescript.js";

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
