import type * as TypeScript from "@tslab/typescript-for-tslab";
import { ts } from "./compiler/typescript.js";
import type { Completions } from "./complete.js";

/**
 * Names that fit inside the string at an offset: columns of the table that the surrounding call works on (its first
 * argument, or what its method is called on), a fit's terms, or the columns of all tables in scope. Undefined outside
 * strings, and where no table is in scope.
 */
export function columnsAt(
  code: string,
  offset: number,
  values: Readonly<Record<string, unknown>>,
): Completions | undefined {
  const file = ts.createSourceFile("cell.ts", code, ts.ScriptTarget.Latest, true, ts.ScriptKind.TS);
  const string = stringAt(file, offset);
  if (!string) return undefined;
  const start = string.getStart(file) + 1;
  const closed = string.end - start > 0 && code[string.end - 1] === code[start - 1] && string.end > start;
  const end = closed ? string.end - 1 : string.end;
  const typed = code.slice(start, offset);
  const names = subjectNames(string, values) ?? allColumns(values);
  if (names.length === 0) return undefined;
  const quote = code[start - 1]!;
  const matches = names.filter((name) => name.toLowerCase().startsWith(typed.toLowerCase()));
  return {
    matches: matches.map((name) => escaped(name, quote)),
    start,
    end: Math.max(end, offset),
    types: matches.map(() => "column"),
  };
}

function stringAt(file: TypeScript.SourceFile, offset: number): TypeScript.Node | undefined {
  let found: TypeScript.Node | undefined;
  const visit = (node: TypeScript.Node): void => {
    if (offset < node.getStart(file) || offset > node.end) return;
    const isString = ts.isStringLiteral(node) || ts.isNoSubstitutionTemplateLiteral(node);
    if (isString && offset > node.getStart(file) && !ts.isImportDeclaration(node.parent)) {
      const closed = node.end - node.getStart(file) >= 2 && /["'`]/.test(file.text[node.end - 1]!);
      if (!(closed && offset === node.end)) found = node;
    }
    ts.forEachChild(node, visit);
  };
  visit(file);
  return found;
}

/** Names belonging to the nearest enclosing call that works on a known table or fit. */
function subjectNames(
  node: TypeScript.Node,
  values: Readonly<Record<string, unknown>>,
): string[] | undefined {
  for (let at: TypeScript.Node | undefined = node.parent; at; at = at.parent) {
    if (!ts.isCallExpression(at)) continue;
    const subjects: TypeScript.Node[] = [...at.arguments.slice(0, 1)];
    if (ts.isPropertyAccessExpression(at.expression)) subjects.push(rootOf(at.expression.expression));
    for (const subject of subjects) {
      if (!ts.isIdentifier(subject)) continue;
      const names = namesOf(values[subject.text]);
      if (names) return names;
    }
  }
  return undefined;
}

/** The name at the head of a chain: `weeks` of `weeks.between(...).define(...)`. */
function rootOf(node: TypeScript.Expression): TypeScript.Expression {
  let at = node;
  while (ts.isPropertyAccessExpression(at) || ts.isCallExpression(at)) at = at.expression;
  return at;
}

function namesOf(value: unknown): string[] | undefined {
  if (typeof value !== "object" || value === null) return undefined;
  const { kind, columns, terms } = value as {
    kind?: unknown;
    columns?: { name: string }[];
    terms?: string[];
  };
  if (kind === "time-table" && Array.isArray(columns)) return columns.map(({ name }) => name);
  if (kind === "fit" && Array.isArray(terms)) return [...terms];
  return undefined;
}

function allColumns(values: Readonly<Record<string, unknown>>): string[] {
  const names = Object.values(values).flatMap((value) =>
    (value as { kind?: unknown } | null)?.kind === "time-table" ? (namesOf(value) ?? []) : [],
  );
  return [...new Set(names)];
}

function escaped(name: string, quote: string): string {
  return JSON.stringify(name).slice(1, -1).replaceAll('\\"', '"').replaceAll(quote, `\\${quote}`);
}
