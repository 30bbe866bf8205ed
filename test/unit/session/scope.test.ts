import assert from "node:assert/strict";
import { test } from "node:test";
import { Scope } from "../../../kernel/session/scope.js";

test("the user's names lie over those that are given", () => {
  const scope = new Scope({ fit: "given" });
  assert.equal(scope.names["fit"], "given");
  scope.names["fit"] = "own";
  assert.equal(scope.names["fit"], "own");
  assert.deepEqual(Object.keys(scope.names), ["fit"]);
  assert.equal(scope.names["toString"], undefined);
});

test("the last value is taken once", () => {
  const scope = new Scope({});
  scope.names["last"] = 7;
  assert.equal(scope.take("last"), 7);
  assert.equal(scope.take("last"), undefined);
});
