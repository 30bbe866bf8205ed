import assert from "node:assert/strict";
import { test } from "node:test";
import { escapeHtml, html, trusted } from "../../../../src/show/text/html.js";

test("strings in a template are escaped, markup is not", () => {
  const evil = `"><svg onload=alert(1)>&'`;
  assert.equal(
    html`<p title="${evil}">${evil}</p>`.markup,
    `<p title="&quot;&gt;&lt;svg onload=alert(1)&gt;&amp;&#39;">&quot;&gt;&lt;svg onload=alert(1)&gt;&amp;&#39;</p>`,
  );
  assert.equal(html`<b>${html`<i>${"<"}</i>`}</b>`.markup, "<b><i>&lt;</i></b>");
  assert.equal(html`${trusted("<br>")}${[html`a`, "<", 2]}${false}${undefined}`.markup, "<br>a&lt;2");
});

test("an object that claims to be markup is none", () => {
  const forged = { markup: "<script>alert(1)</script>" } as never;
  assert.throws(() => html`${forged}`.markup);
});

test("line breaks and control characters in a text are written out", () => {
  assert.equal(escapeHtml("a\n<b>\u0000"), "a\\n&lt;b&gt;\\u{0}");
});
