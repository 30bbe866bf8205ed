import assert from "node:assert/strict";
import { test } from "node:test";
import { asyncSteps } from "../../../kernel/session/async-steps.js";
import { inSteps } from "../../../kernel/session/compiler/steps.js";

const script = (js: string) => inSteps(js).script;

test("top-level awaits become yields with their precedence kept; those of functions stay", () => {
  assert.equal(script("x = await a + 1"), "x = (yield a) + 1");
  assert.equal(script("await (await c)()"), "(yield ((yield c))())");
  assert.equal(script("await await d;"), "(yield (yield d));");
  assert.equal(script("await (e)"), "(yield (e))");
  for (const js of ["f(async () => await b)", "class A { async f() { await b } }", "'await'"]) {
    assert.deepEqual(inSteps(js), { script: js, style: "plain" });
  }
});

/** Runs compiled code as a cell is: whatever it yields is awaited. */
async function run(js: string, given: Record<string, unknown>): Promise<void> {
  const { script, style } = inSteps(js);
  assert.equal(style, "generator");
  (globalThis as Record<symbol, unknown>)[Symbol.for("lagbook.asyncSteps")] = asyncSteps;
  const body = new Function(...Object.keys(given), `return function*() {${script}}`);
  const cell = body(...Object.values(given))() as Generator<unknown, void, unknown>;
  for (let step = cell.next(); !step.done; ) {
    let resume: () => IteratorResult<unknown, void>;
    try {
      const value = await step.value;
      resume = () => cell.next(value);
    } catch (error) {
      resume = () => cell.throw(error);
    }
    step = resume();
  }
}

test("for await does what it does in the language", async () => {
  const said: unknown[] = [];
  const say = (...words: unknown[]) => said.push(...words);
  async function* count() {
    try {
      yield { n: 1 };
      yield { n: 2 };
      yield { n: 3 };
    } finally {
      say("closed");
    }
  }
  async function* broken() {
    yield 1;
    throw new Error("broken");
  }
  await run("for await (const { n } of count()) say(await n);", { count, say });
  assert.deepEqual(said.splice(0), [1, 2, 3, "closed"]);
  await run(
    "out: for await (const { n } of count()) { for (;;) { if (n === 2) break out; say(n); continue out; } }",
    {
      count,
      say,
    },
  );
  assert.deepEqual(said.splice(0), [1, "closed"]);
  await run("let last; for await (last of [Promise.resolve(4), 5]) say(last);", { say });
  assert.deepEqual(said.splice(0), [4, 5]);
  await run("try { for await (const x of broken()) say(x); } catch (error) { say(error.message); }", {
    broken,
    say,
  });
  assert.deepEqual(said.splice(0), [1, "broken"]);
  await run("for await (const row of [[1, 2], [3]]) for await (const x of row) say(x);", { say });
  assert.deepEqual(said.splice(0), [1, 2, 3]);
});
