import type * as TypeScript from "@tslab/typescript-for-tslab";
import type { Edit } from "./edits.js";
import { ts } from "./typescript.js";

/*
 * The converter hands variables, functions, classes and types on to the next cell, but neither namespaces nor what
 * `declare global` says. Namespaces are carried here among the declarations; global blocks become modules of their own.
 */

/** What a cell says with `declare global`. */
export interface GlobalBlocks {
  /** Takes the blocks out of the cell. */
  readonly edits: readonly Edit[];
  /** The cell with nothing but the blocks, place for place. */
  readonly blocks: string;
  /** The names that they declare. */
  readonly names: string;
}

/** A cell without its `declare global` blocks, as edits; and the cell with nothing but them, place for place. */
export function globalBlocks(source: string): GlobalBlocks {
  if (!/\bdeclare\s+global\b/.test(source)) return { edits: [], blocks: "", names: "" };
  const file = parse("cell.ts", source);
  const found = file.statements
    .filter(ts.isModuleDeclaration)
    .filter(isGlobal)
    .map((block) => ({
      at: block.getStart(file),
      end: block.end,
      names: (block.body as TypeScript.ModuleBlock).statements.flatMap(declaredNames).join(),
    }));
  let rest = 0;
  let blocks = "";
  for (const { at, end } of found) {
    blocks += blank(source.slice(rest, at)) + source.slice(at, end);
    rest = end;
  }
  return {
    edits: found.map(({ at, end }) => ({ at, removed: end - at, added: blank(source.slice(at, end)) })),
    blocks,
    names: found.map(({ names }) => names).join(),
  };
}

/** Blanks in the place of a text, with its line breaks. */
function blank(text: string): string {
  return text.replace(/[^\n]/g, " ");
}

/** The declarations after a cell, with those from before it that the converter lost and the cell does not replace. */
export function carry(before: string, after: string): string {
  if (!/\b(?:namespace|module)\b/.test(before)) return after;
  const [old, present] = [parse("before.d.ts", before), parse("after.d.ts", after)];
  const replaced = new Set(present.statements.flatMap(declaredNames));
  const texts = new Set(present.statements.map((statement) => statement.getText(present)));
  const lost = old.statements
    .filter(ts.isModuleDeclaration)
    .filter(({ name }) => !replaced.has(name.text))
    .map((statement) => statement.getText(old))
    .filter((text) => !texts.has(text));
  return after + [...new Set(lost)].map((text) => `${text}\n`).join("");
}

function isGlobal(statement: TypeScript.Statement): boolean {
  return ts.isModuleDeclaration(statement) && (statement.flags & ts.NodeFlags.GlobalAugmentation) !== 0;
}

function declaredNames(statement: TypeScript.Statement): string[] {
  if (ts.isVariableStatement(statement)) {
    return statement.declarationList.declarations.map(({ name }) => name.getText());
  }
  if (ts.isImportDeclaration(statement)) {
    const { name, namedBindings } = statement.importClause ?? {};
    const elements =
      namedBindings && ts.isNamedImports(namedBindings) ? [...namedBindings.elements] : [namedBindings];
    return [name, ...elements.map((element) => element?.name)].flatMap((id) => (id ? [id.text] : []));
  }
  const { name } = statement as TypeScript.DeclarationStatement;
  return name ? [name.text] : [];
}

function parse(name: string, text: string): TypeScript.SourceFile {
  return ts.createSourceFile(name, text, ts.ScriptTarget.Latest, true, ts.ScriptKind.TS);
}
