import assert from "node:assert/strict";
import { test } from "node:test";
import { bundleOf } from "../../../kernel/session/bundle.js";

const display = Symbol.for("Jupyter.display");

test("a value with the display symbol shows as its bundle, promised or not", async () => {
  assert.deepEqual(await bundleOf({ [display]: () => ({ "text/html": "<b>x</b>" }) }), {
    "text/html": "<b>x</b>",
  });
  assert.deepEqual(await bundleOf({ [display]: async () => ({ "text/plain": "x" }) }), { "text/plain": "x" });
});

test("anything else shows as inspected text", async () => {
  assert.deepEqual(await bundleOf("x"), { "text/plain": "'x'" });
  assert.deepEqual(await bundleOf(null), { "text/plain": "null" });
  assert.match(String((await bundleOf(new Map([[1, 2]])))["text/plain"]), /Map\(1\)/);
});

test("a display that fails, and a value that resists inspection, are said and not thrown", async () => {
  const failing = {
    [display]: () => {
      throw new Error("no picture");
    },
  };
  assert.match(String((await bundleOf(failing))["text/plain"]), /its display failed: Error: no picture/);
  const resisting = new Proxy(
    {},
    {
      get: () => {
        throw new Error("hands off");
      },
    },
  );
  assert.equal(typeof (await bundleOf(resisting))["text/plain"], "string");
});
