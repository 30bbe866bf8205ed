import type * as TypeScript from "@tslab/typescript-for-tslab";
import { ts } from "../compiler/typescript.js";
import type { Completions } from "./completions.js";
import { isModuleName, type Place } from "./place.js";

type Values = Readonly<Record<string, unknown>>;

/**
 * Names that fit at a place: columns of the tables that the surrounding call works on (its first argument, or what its
 * method is called on), a fit's terms, or in a string with neither at hand the columns of all tables in scope.
 */
export function columnsAt(
  place: Place,
  code: string,
  offset: number,
  values: Values,
): Completions | undefined {
  if (place.kind === "other" || isModuleName(place.node)) return undefined;
  const typed = code.slice(place.start, offset).toLowerCase();
  const names = subjectNames(place.node, values) ?? (place.kind === "string" ? allColumns(values) : []);
  const fitting = names.filter((name) => name.toLowerCase().startsWith(typed));
  const matches = fitting.flatMap((name) => {
    if (place.kind === "string") return [escaped(name, place.quote)];
    if (isIdentifier(name)) return [name];
    return place.kind === "key" ? [JSON.stringify(name)] : [];
  });
  if (matches.length === 0) return undefined;
  return {
    matches,
    start: place.start,
    end: Math.max(place.end, offset),
    types: matches.map(() => "column"),
  };
}

/** Names belonging to the nearest enclosing call that works on a known table or fit. */
function subjectNames(node: TypeScript.Node, values: Values): string[] | undefined {
  for (let at: TypeScript.Node | undefined = node.parent; at; at = at.parent) {
    if (!ts.isCallExpression(at)) continue;
    const subjects: TypeScript.Node[] = at.arguments
      .slice(0, 1)
      .filter((argument) => !contains(argument, node));
    if (ts.isPropertyAccessExpression(at.expression)) subjects.push(at.expression.expression);
    const names = [...new Set(subjects.flatMap((subject) => namesIn(subject, values)))];
    if (names.length > 0) return names;
  }
  return undefined;
}

function contains(outer: TypeScript.Node, inner: TypeScript.Node): boolean {
  return outer.pos <= inner.pos && inner.end <= outer.end;
}

/** Names of the tables and fits in a chain like `weeks.join(other).define({ real: ... })`, with those that it defines. */
function namesIn(node: TypeScript.Node, values: Values): string[] {
  if (ts.isIdentifier(node)) return namesOf(values[node.text]);
  if (ts.isPropertyAccessExpression(node)) return namesIn(node.expression, values);
  if (!ts.isCallExpression(node)) return [];
  const { expression } = node;
  const names = [
    ...namesIn(expression, values),
    ...node.arguments.flatMap((given) => namesIn(given, values)),
  ];
  if (names.length > 0 && ts.isPropertyAccessExpression(expression) && expression.name.text === "define") {
    names.push(...node.arguments.flatMap(keysOf));
  }
  return names;
}

function keysOf(node: TypeScript.Node): string[] {
  if (!ts.isObjectLiteralExpression(node)) return [];
  return node.properties.flatMap(({ name }) =>
    name && (ts.isIdentifier(name) || ts.isStringLiteral(name)) ? [name.text] : [],
  );
}

function namesOf(value: unknown): string[] {
  if (typeof value !== "object" || value === null) return [];
  const { kind, columns, terms } = value as {
    kind?: unknown;
    columns?: { name: string }[];
    terms?: string[];
  };
  if (kind === "time-table" && Array.isArray(columns)) return columns.map(({ name }) => name);
  if (kind === "fit" && Array.isArray(terms)) return [...terms];
  return [];
}

function allColumns(values: Values): string[] {
  const tables = Object.values(values).filter(
    (value) => (value as { kind?: unknown } | null | undefined)?.kind === "time-table",
  );
  return [...new Set(tables.flatMap(namesOf))];
}

function isIdentifier(name: string): boolean {
  return /^[\p{L}_$][\p{L}\p{N}_$]*$/u.test(name);
}

function escaped(name: string, quote: string): string {
  return JSON.stringify(name).slice(1, -1).replaceAll('\\"', '"').replaceAll(quote, `\\${quote}`);
}
