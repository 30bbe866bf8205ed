import assert from "node:assert/strict";
import { test } from "node:test";
import { type CellScript, thrownFailure, typeFailure } from "../../../kernel/session/failure.js";
import { Interrupted } from "../../../kernel/session/interruption.js";

test("a type error has its line and a caret as long as the place", () => {
  const problem = { message: "No.", line: 1, character: 4, length: 3 };
  assert.deepEqual(typeFailure([problem], "first\n\tab cde f").traceback, [
    "line 2: No.",
    "    \tab cde f",
    "    \t   ^^^",
  ]);
  assert.deepEqual(typeFailure([{ ...problem, file: "helper.ts" }], "").traceback, [
    "helper.ts, line 2: No.",
  ]);
});

test("of a stack only the user's lines are told, each once", () => {
  const script: CellScript = { source: "a\nb\nc", name: "cell [4]", sourceLine: (line) => line };
  const error = new RangeError("far");
  error.stack =
    "RangeError: far\n    at f (lagbook-cell-9.js:2:1)\n    at f (lagbook-cell-9.js:2:7)\n    at deep (/lib/x.js:9:9)\n    at lagbook-cell-9.js:3:1";
  assert.deepEqual(thrownFailure(error, new Map([["lagbook-cell-9.js", script]])), {
    ename: "RangeError",
    evalue: "far",
    traceback: ["RangeError: far", "  cell [4], line 2", "    b", "  cell [4], line 3", "    c"],
  });
});

test("what is thrown need not be an error, and an error may have a cause", () => {
  assert.equal(thrownFailure("just text", new Map()).evalue, "just text");
  assert.equal(thrownFailure({ code: 7 }, new Map()).evalue, "{ code: 7 }");
  assert.equal(thrownFailure(undefined, new Map()).evalue, "undefined");
  const caused = new Error("outer", { cause: new TypeError("inner") });
  assert.deepEqual(thrownFailure(caused, new Map()).traceback, [
    "Error: outer",
    "  caused by TypeError: inner",
  ]);
  assert.equal(thrownFailure(new Interrupted(), new Map()).ename, "Interrupted");
});
