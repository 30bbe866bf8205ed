import assert from "node:assert/strict";
import { test } from "node:test";
import type { Sent } from "../../../kernel/rerun/collector.js";
import type { Cell, Notebook } from "../../../kernel/rerun/notebook.js";
import { type CellReply, languageInfo, rerun } from "../../../kernel/rerun/rerun.js";
import { kernelInfo } from "../../../kernel/wire/kernel-info.js";

const code = (source: string, metadata: Record<string, unknown> = {}): Cell => ({
  cell_type: "code",
  source,
  metadata,
  execution_count: 99,
  outputs: [{ output_type: "stream", name: "stdout", text: "from an earlier run" }],
});
const text = (source: string): Cell => ({ cell_type: "markdown", source, metadata: {} });
const notebook = (...cells: Cell[]): Notebook => ({
  nbformat: 4,
  nbformat_minor: 5,
  metadata: { kernelspec: { name: "other" }, authors: [] },
  cells,
});

/** A session that prints each cell's text and fails where the text says so. */
function scripted() {
  const log: string[] = [];
  let count = 0;
  let release: (() => void) | undefined;
  const open = async (emit: (sent: Sent) => void) => ({
    async execute(source: string): Promise<CellReply> {
      log.push(source);
      const execution_count = ++count;
      if (source === "wait") {
        await new Promise<void>((settle) => {
          release = settle;
        });
        return { status: "error", execution_count, ename: "Interrupted", evalue: "" };
      }
      emit({ type: "stream", name: "stdout", text: source });
      if (!source.startsWith("fail")) return { status: "ok", execution_count };
      emit({ type: "error", ename: "InputError", evalue: "no such column", traceback: ["t"] });
      return { status: "error", execution_count, ename: "InputError", evalue: "no such column" };
    },
    interrupt() {
      log.push("<interrupt>");
      release?.();
    },
    close() {
      log.push("<close>");
    },
  });
  return { log, open };
}

test("code cells run in order in one session, and only this run's outputs are kept", async () => {
  const { log, open } = scripted();
  const original = notebook(text("# T"), code("one"), code("  \n"), code("two"));
  const before = structuredClone(original);
  const run = await rerun(original, open);
  assert.deepEqual(log, ["one", "two", "<close>"]);
  assert.equal(run.failure, undefined);
  assert.deepEqual(
    run.notebook.cells.map((cell) => cell.execution_count),
    [undefined, 1, null, 2],
  );
  assert.deepEqual(run.notebook.cells[2]!.outputs, []);
  assert.deepEqual(run.notebook.cells[3]!.outputs, [{ output_type: "stream", name: "stdout", text: "two" }]);
  assert.equal((run.notebook.metadata["kernelspec"] as { name: string }).name, "lagbook");
  assert.deepEqual(run.notebook.metadata["authors"], []);
  assert.deepEqual(original, before, "the notebook that was given is left alone");
});

test("a failing cell ends the run, with its number and message; later cells show no old output", async () => {
  const { log, open } = scripted();
  const run = await rerun(notebook(code("one"), text("x"), code("fail"), code("three"), code("four")), open);
  assert.deepEqual(log, ["one", "fail", "<close>"]);
  assert.deepEqual(run.failure, { cell: 3, execution: 2, message: "InputError: no such column", left: 2 });
  assert.deepEqual(run.notebook.cells[3]!.outputs, []);
  assert.equal(run.notebook.cells[3]!.execution_count, null);
});

test("a cell that says its failure is meant does not end the run", async () => {
  const { log, open } = scripted();
  const run = await rerun(notebook(code("fail", { tags: ["raises-exception"] }), code("two")), open);
  assert.deepEqual(log, ["fail", "two", "<close>"]);
  assert.equal(run.failure, undefined);
});

test("a cell past its time is interrupted, tag or no tag, and the message says so", async () => {
  const { log, open } = scripted();
  const run = await rerun(notebook(code("wait", { tags: ["raises-exception"] }), code("two")), open, {
    timeout: 0.05,
  });
  assert.deepEqual(log, ["wait", "<interrupt>", "<close>"]);
  assert.match(run.failure!.message, /longer than 0\.05 s/);
  assert.equal(run.failure!.left, 1);
});

test("an abort interrupts the cell that runs and starts no other", async () => {
  const { log, open } = scripted();
  const stop = new AbortController();
  const running = rerun(notebook(code("wait"), code("two")), open, { signal: stop.signal });
  setImmediate(() => stop.abort());
  const run = await running;
  assert.deepEqual(log, ["wait", "<interrupt>", "<close>"]);
  assert.equal(run.failure!.cell, 1);
});

test("the session is closed if it breaks", async () => {
  const { log, open } = scripted();
  const broken = async (emit: (sent: Sent) => void) => ({
    ...(await open(emit)),
    execute: async (): Promise<CellReply> => {
      throw new Error("lost");
    },
  });
  await assert.rejects(rerun(notebook(code("one")), broken), /lost/);
  assert.deepEqual(log, ["<close>"]);
});

test("a rerun notebook names the language as the kernel does in Jupyter", () => {
  assert.deepEqual(languageInfo, kernelInfo()["language_info"]);
});
