import assert from "node:assert/strict";
import { test } from "node:test";
import { shareVariables } from "../../../kernel/session/compiler/live-names.js";
import { plainOutput } from "../../../kernel/session/compiler/plain-output.js";

test("variables are exported where they stand, other names by the list", () => {
  assert.equal(
    shareVariables("let n = 0, m;\nconst c = 1;\nvar { a, b: [d] } = o;\nexport { n, m, c, a, d };"),
    "export let n = 0, m = undefined;\nconst c = 1;\nexport var { a, b: [d] } = o;\nexport { c };",
  );
  for (const module of ["const c = 1;\nexport { c };", "let n = 0;", "let n = 0;\nexport { n as m };"]) {
    assert.equal(shareVariables(module), module);
  }
});

test("a compiled cell sets its names as plain properties, and none before it has a value", () => {
  const js = [
    'Object.defineProperty(exports, "__esModule", { value: true });',
    "exports.café = exports.b = void 0;",
    'const path_1 = require("path");',
    'Object.defineProperty(exports, "join", { enumerable: true, get: function () { return path_1.join; } });',
    "Promise.resolve(name).then(s => __importStar(require(s)));",
  ];
  assert.deepEqual(plainOutput(js.join("\n")).split("\n"), [
    "",
    "",
    'const path_1 = require("path");',
    "exports.join = path_1.join;",
    "Promise.resolve(name).then(async (s) => __importStar(await require.prepared(s)));",
  ]);
});
