import assert from "node:assert/strict";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { run } from "../../../kernel/install/command.js";
import type { Sent } from "../../../kernel/rerun/collector.js";
import { parseNotebook, writeNotebook } from "../../../kernel/rerun/notebook.js";
import { rerun } from "../../../kernel/rerun/rerun.js";
import { python, without } from "../../machine/needs.js";

const everything: Sent[] = [
  { type: "stream", name: "stdout", text: "é\n\u2028line\fone\r\ntwo\rthree" },
  {
    type: "display_data",
    data: { "text/plain": "a\nb", "application/x+json": [1] },
    transient: { display_id: "d" },
  },
  { type: "update_display_data", data: { "text/html": "<b>2</b>" }, transient: { display_id: "d" } },
  { type: "execute_result", data: { "text/plain": "" }, metadata: { "text/plain": {} }, execution_count: 1 },
  { type: "error", ename: "E", evalue: "v", traceback: [] },
];

// The judge is Python's nbformat: its schema, and byte by byte the way it writes the same notebook.
const judge = `
import nbformat, sys
text = open(sys.argv[1], encoding="utf-8").read()
notebook = nbformat.reads(text, as_version=nbformat.NO_CONVERT)
nbformat.validate(notebook)
sys.exit(0 if nbformat.writes(notebook, version=nbformat.NO_CONVERT) + "\\n" == text else 3)
`;

for (const minor of [4, 5]) {
  test(`an executed notebook of format 4.${minor} is valid and written as Jupyter writes it`, {
    skip: without("python"),
  }, async () => {
    const id = minor >= 5 ? { id: "c1" } : {};
    const source = JSON.stringify({
      nbformat: 4,
      nbformat_minor: minor,
      metadata: {},
      cells: [{ cell_type: "code", ...id, source: "x", metadata: {}, execution_count: null, outputs: [] }],
    });
    const { notebook } = await rerun(parseNotebook(source, "n.ipynb"), async (emit) => ({
      async execute() {
        everything.forEach(emit);
        return { status: "ok", execution_count: 1 };
      },
      interrupt() {},
      close() {},
    }));
    const folder = mkdtempSync(join(tmpdir(), "lagbook-"));
    try {
      const file = join(folder, "n.ipynb");
      writeFileSync(file, writeNotebook(notebook));
      const end = await run(python, ["-c", judge, file]);
      assert.equal(end.code, 0, end.text);
    } finally {
      rmSync(folder, { recursive: true });
    }
  });
}
