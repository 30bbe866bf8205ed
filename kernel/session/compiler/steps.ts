import type * as TypeScript from "@tslab/typescript-for-tslab";
import { applyEdits, type Edit } from "./edits.js";
import { ts } from "./typescript.js";

/** How a compiled cell is run: straight through, or from one top-level await to the next. */
export interface Steps {
  readonly script: string;
  readonly style: "plain" | "generator";
}

/** The expression by which a compiled cell reaches `asyncSteps`. */
const helper = 'globalThis[Symbol.for("lagbook.asyncSteps")]';

/**
 * Turns the awaits at the top level of a compiled cell into yields, so that each stretch between two of them can be run,
 * and interrupted, on its own. `for await` becomes a loop over `asyncSteps`, each of whose promises is yielded.
 */
export function inSteps(js: string): Steps {
  if (!/\bawait\b/.test(js)) return { script: js, style: "plain" };
  // Only in a module is a top-level `await (x)` an await and not the call of a function of that name.
  const module = `${js}\nexport {};`;
  const file = ts.createSourceFile("cell.js", module, ts.ScriptTarget.Latest, true, ts.ScriptKind.JS);
  const edits: Edit[] = [];
  const visit = (node: TypeScript.Node): void => {
    if (ts.isFunctionLike(node) || ts.isClassStaticBlockDeclaration(node)) return;
    if (ts.isForOfStatement(node) && node.awaitModifier) {
      edits.push(...loopEdits(node, file, edits.length));
      visit(node.expression);
      visit(node.statement);
      edits.push({ at: node.statement.end, removed: 0, added: " }" });
      return;
    }
    const start = node.getStart(file);
    if (ts.isAwaitExpression(node)) edits.push({ at: start, removed: 5, added: "(yield" });
    ts.forEachChild(node, visit);
    if (ts.isAwaitExpression(node)) edits.push({ at: node.end, removed: 0, added: ")" });
  };
  visit(file);
  if (edits.length === 0) return { script: js, style: "plain" };
  return { script: applyEdits(js, edits).text, style: "generator" };
}

/** `for await (x of s) body` as `for (const step of asyncSteps(s)) { const got = (yield step); ...; x = got.value; body }`. */
function loopEdits(loop: TypeScript.ForOfStatement, file: TypeScript.SourceFile, serial: number): Edit[] {
  const [start, from, body] = [loop, loop.expression, loop.statement].map((node) => node.getStart(file));
  const [step, got] = [`$step${serial}`, `$got${serial}`];
  const target = loop.initializer.getText(file);
  const set = ts.isVariableDeclarationList(loop.initializer)
    ? `${target} = ${got}.value;`
    : `(${target} = ${got}.value);`;
  return [
    { at: start!, removed: from! - start!, added: `for (const ${step} of ${helper}(` },
    { at: loop.expression.end, removed: 0, added: ")" },
    {
      at: body!,
      removed: 0,
      added: `{ const ${got} = (yield ${step}); if (${got}.done) break; ${set} `,
    },
  ];
}
