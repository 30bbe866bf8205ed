import type * as TypeScript from "@tslab/typescript-for-tslab";
import { ts } from "../compiler/typescript.js";

/** Where the cursor is, as far as completions need to know. */
export type Place =
  /** Inside the quotes of a string. */
  | {
      readonly kind: "string";
      readonly node: TypeScript.Node;
      readonly start: number;
      readonly end: number;
      readonly quote: string;
    }
  /** Where an object that is handed to a call gets its next key. */
  | { readonly kind: "key"; readonly node: TypeScript.Node; readonly start: number; readonly end: number }
  /** Behind the dot of a function's own parameter. */
  | { readonly kind: "member"; readonly node: TypeScript.Node; readonly start: number; readonly end: number }
  | { readonly kind: "other" };

/** Finds out where in a cell an offset is. */
export function placeAt(code: string, offset: number): Place {
  const file = ts.createSourceFile("cell.ts", code, ts.ScriptTarget.Latest, true, ts.ScriptKind.TS);
  let found: Place = { kind: "other" };
  const visit = (node: TypeScript.Node): void => {
    // Unfinished text may end before the blanks in front of the cursor.
    if (offset < node.getStart(file) || code.slice(node.end, offset).trim() !== "") return;
    found = placeIn(node, file, offset) ?? found;
    ts.forEachChild(node, visit);
  };
  visit(file);
  return found;
}

function placeIn(node: TypeScript.Node, file: TypeScript.SourceFile, offset: number): Place | undefined {
  const start = node.getStart(file);
  if (offset === start) return undefined;
  if (ts.isStringLiteral(node) || ts.isNoSubstitutionTemplateLiteral(node)) {
    const quote = file.text[start]!;
    const closed = node.end - start >= 2 && file.text[node.end - 1] === quote;
    if (closed ? offset >= node.end : offset > node.end) return { kind: "other" };
    return { kind: "string", node, start: start + 1, end: closed ? node.end - 1 : node.end, quote };
  }
  if (ts.isFunctionLike(node) || ts.isPropertyAssignment(node)) {
    // In a function's body, or behind a key's colon, the object around it is no longer at hand.
    const within = ts.isPropertyAssignment(node) ? node.name.end : start;
    if (offset > within) return { kind: "other" };
  }
  const [from, to] = wordAround(file.text, offset);
  if (ts.isObjectLiteralExpression(node) && ts.isCallExpression(node.parent)) {
    const closed = file.text[node.end - 1] === "}" && offset >= node.end;
    return closed ? { kind: "other" } : { kind: "key", node, start: from, end: to };
  }
  if (ts.isPropertyAccessExpression(node) && offset > node.expression.end) {
    const { expression } = node;
    if (ts.isIdentifier(expression) && isParameter(node, expression.text)) {
      return { kind: "member", node, start: from, end: to };
    }
  }
  return undefined;
}

/** Whether a node names the module of an import. */
export function isModuleName(node: TypeScript.Node): boolean {
  const { parent } = node;
  if (ts.isImportDeclaration(parent)) return true;
  return ts.isCallExpression(parent) && /^(?:import|require)$/.test(parent.expression.getText());
}

function isParameter(node: TypeScript.Node, name: string): boolean {
  for (let at: TypeScript.Node | undefined = node.parent; at; at = at.parent) {
    if (ts.isFunctionLike(at) && at.parameters.some((parameter) => parameter.name.getText() === name))
      return true;
  }
  return false;
}

function wordAround(text: string, offset: number): [number, number] {
  const before = /[\p{L}\p{N}_$]*$/u.exec(text.slice(0, offset))![0].length;
  const after = /^[\p{L}\p{N}_$]*/u.exec(text.slice(offset))![0].length;
  return [offset - before, offset + after];
}
