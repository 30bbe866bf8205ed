import type * as TypeScript from "@tslab/typescript-for-tslab";
import { applyEdits, type Edit } from "./edits.js";
import { ts } from "./typescript.js";

/**
 * Declares the variables of a cell's module as exported where they stand, not in the list at its end. A function of the
 * cell then reads and writes the very variable that later cells do; with the list it would keep one of its own.
 */
export function shareVariables(module: string): string {
  if (!/^\s*(?:let|var)\b/m.test(module)) return module;
  const file = ts.createSourceFile("cell.js", module, ts.ScriptTarget.Latest, true, ts.ScriptKind.JS);
  const list = file.statements.find(isExportList);
  if (!list) return module;
  const listed = new Set(list.exportClause.elements.map(({ name }) => name.text));
  const edits: Edit[] = [];
  for (const statement of file.statements) {
    if (!ts.isVariableStatement(statement) || statement.modifiers?.length) continue;
    if (statement.declarationList.flags & ts.NodeFlags.Const) continue;
    const names = statement.declarationList.declarations.flatMap(({ name }) => boundNames(name));
    if (!names.every((name) => listed.has(name))) continue;
    edits.push({ at: statement.getStart(file), removed: 0, added: "export " });
    for (const { name, initializer } of statement.declarationList.declarations) {
      // Declared anew, a variable is empty even if an earlier cell had one of that name.
      if (!initializer) edits.push({ at: name.end, removed: 0, added: " = undefined" });
    }
    for (const name of names) listed.delete(name);
  }
  const start = list.getStart(file);
  edits.push({
    at: start,
    removed: list.end - start,
    added: `export { ${[...listed].join(", ")} };`,
  });
  return applyEdits(module, edits).text;
}

type ExportList = TypeScript.ExportDeclaration & { exportClause: TypeScript.NamedExports };

function isExportList(statement: TypeScript.Statement): statement is ExportList {
  return (
    ts.isExportDeclaration(statement) &&
    !statement.moduleSpecifier &&
    statement.exportClause !== undefined &&
    ts.isNamedExports(statement.exportClause) &&
    statement.exportClause.elements.length > 0 &&
    statement.exportClause.elements.every(({ propertyName }) => !propertyName)
  );
}

function boundNames(name: TypeScript.BindingName): string[] {
  if (ts.isIdentifier(name)) return [name.text];
  return name.elements.flatMap((element) =>
    ts.isOmittedExpression(element) ? [] : boundNames(element.name),
  );
}
