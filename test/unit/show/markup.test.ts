import assert from "node:assert/strict";
import { test } from "node:test";
import { faults, svgFaults } from "./markup.js";

test("the checker of markup sees each kind of breach", () => {
  assert.deepEqual(faults('<div style="opacity:0.8">a &amp; b</div>'), []);
  assert.match(faults("<script>x</script>").join(), /tag <script>/);
  assert.match(faults('<img src="x" onerror="alert(1)">').join(), /<img onerror>/);
  assert.match(faults('<img src="https://example.org/a.png">').join(), /src https/);
  assert.match(faults('<div style="position:fixed">a</div>').join(), /style position:fixed/);
  assert.match(faults('<div style="background:url(x)">a</div>').join(), /style background/);
  assert.match(faults("<div><span></div></span>").join(), /closes/);
  assert.match(faults("<div>").join(), /left open/);
  assert.match(faults("a > b").join(), /bare >/);
  assert.match(faults("a & b").join(), /bare &/);
  assert.match(faults('<p title=""><svg onload=x>">').join(), /tag <svg>|no tag/);
});

test("the checker of pictures sees what could run or load", () => {
  assert.deepEqual(svgFaults("<svg><text>onload=alert(1)</text></svg>"), []);
  assert.match(svgFaults("<svg><script>1</script></svg>").join(), /script/);
  assert.match(svgFaults("<svg><image/></svg>").join(), /image/);
  assert.match(svgFaults('<svg><path onload="x"/></svg>').join(), /onload/);
  assert.match(svgFaults('<svg><g href="x"/></svg>').join(), /href/);
});
