import assert from "node:assert/strict";
import { test } from "node:test";
import { slim } from "../../../src/show/chart/slim.js";

test("coordinates are rounded, mark descriptions go, texts and names stay", () => {
  const svg =
    '<g role="graphics-symbol" aria-label="a: 1.23456"><path d="M1.23456,-0.0001234L2,3.5" transform="translate(0.12345,7)" opacity="1"/><path d="M0,0" opacity="0"/>' +
    '<text fill="#777">1.23456 role="x"</text></g>';
  assert.equal(
    slim(svg),
    '<g><path d="M1.23,0L2,3.5" transform="translate(0.12,7)"/><text fill="#777">1.23456 role="x"</text></g>',
  );
});
