import type * as TypeScript from "@tslab/typescript-for-tslab";
import type { Edit } from "./edits.js";
import { ts } from "./typescript.js";

/**
 * Works around what the converter does not take: `export` before a declaration is blanked out, and the shorthand `{ n }`
 * becomes `{ n: n }`, since a name of an earlier cell is a property there.
 */
export function prepare(source: string): readonly Edit[] {
  const edits: Edit[] = [...withoutExports(source)];
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
  visit(parse(source));
  return edits;
}

/** Blanks `export` before declarations: a cell's names are shared anyway. */
export function withoutExports(source: string): readonly Edit[] {
  if (!/\bexport\b/.test(source)) return [];
  const file = parse(source);
  const modifiers = file.statements.flatMap((statement) =>
    ts.canHaveModifiers(statement) ? [...(ts.getModifiers(statement) ?? [])] : [],
  );
  return modifiers
    .filter(({ kind }) => kind === ts.SyntaxKind.ExportKeyword || kind === ts.SyntaxKind.DefaultKeyword)
    .map((modifier) => {
      const start = modifier.getStart(file);
      return { at: start, removed: modifier.end - start, added: " ".repeat(modifier.end - start) };
    });
}

function parse(source: string): TypeScript.SourceFile {
  return ts.createSourceFile("cell.ts", source, ts.ScriptTarget.Latest, true, ts.ScriptKind.TS);
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
  const file = parse(source);
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
