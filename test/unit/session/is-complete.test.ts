import assert from "node:assert/strict";
import { test } from "node:test";
import { isComplete } from "../../../kernel/session/is-complete.js";

const table: readonly (readonly [string, "complete" | "incomplete" | "invalid"])[] = [
  ["", "complete"],
  ["1 + 1", "complete"],
  ["const m = fit(weeks, 'riders', ['fare'])", "complete"],
  ["await load('x.csv', { time: 'week' })", "complete"],
  ["function f(x: number) {", "incomplete"],
  ["fit(weeks, 'riders', [", "incomplete"],
  ["const t = `open", "incomplete"],
  ["/* open", "incomplete"],
  ["if (a) {\n  b\n", "incomplete"],
  ["1 +", "incomplete"],
  ["const = 3", "invalid"],
  ["let let a b", "invalid"],
  ["'unclosed\n1", "invalid"],
  ["}", "invalid"],
];

for (const [code, status] of table) {
  test(`${JSON.stringify(code)} is ${status}`, () => assert.equal(isComplete(code).status, status));
}

test("the next line is indented after an opening bracket", () => {
  assert.equal(isComplete("  if (a) {").indent, "    ");
  assert.equal(isComplete("f(\n  1,").indent, "  ");
});
