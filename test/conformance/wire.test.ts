import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import fc from "fast-check";
import { KernelClient, type Seen } from "../support/kernel-client.js";

let kernel: KernelClient;
before(async () => {
  kernel = await KernelClient.start();
});
after(async () => {
  await kernel.close();
});

const result = (outputs: readonly Seen[]) =>
  outputs.find(({ type }) => type === "execute_result")?.content["data"]["text/plain"];
const texts = (outputs: readonly Seen[], name: string) =>
  outputs
    .filter(({ type, content }) => type === "stream" && content["name"] === name)
    .map(({ content }) => content["text"])
    .join("");

test("a message with a bad signature is dropped and logged, and the kernel goes on", async () => {
  const { id, frames } = kernel.frames(
    "execute_request",
    { code: "globalThis.forged = true" },
    {},
    "another key",
  );
  await kernel.sendRaw("shell", frames);
  const { outputs } = await kernel.run("(globalThis as any).forged === undefined");
  assert.equal(result(outputs), "true");
  assert.equal(
    kernel.published.some(({ parent }) => parent === id),
    false,
  );
  assert.match(kernel.errors, /dropped: the signature does not match/);
});

test("no frames whatever bring the kernel down", async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.array(fc.uint8Array({ maxLength: 60 }), { minLength: 1, maxLength: 8 }),
      fc.constantFrom("shell" as const, "control" as const),
      async (frames, channel) =>
        kernel.sendRaw(
          channel,
          frames.map((frame) => Buffer.from(frame)),
        ),
    ),
    { numRuns: 60, seed: 5 },
  );
  // Signed, but not what the protocol describes.
  for (const content of [{}, { code: 7 }, { code: null }, { cursor_pos: "x" }]) {
    for (const type of [
      "execute_request",
      "complete_request",
      "inspect_request",
      "history_request",
      "is_complete_request",
    ]) {
      const reply = await kernel.request(type, content);
      assert.ok(["ok", "error", "complete", "invalid", "incomplete"].includes(reply.content["status"]), type);
    }
  }
  const { outputs } = await kernel.run("'still here'");
  assert.equal(result(outputs), "'still here'");
});

test("kernel_info says what the kernel is", async () => {
  const { content } = await kernel.request("kernel_info_request", {});
  assert.equal(content["implementation"], "lagbook");
  assert.ok(Number(content["protocol_version"]) >= 5.4);
  assert.equal(content["language_info"].file_extension, ".ts");
});

test("a type error shows its line and a caret; a thrown error the user's lines only", async () => {
  const typed = await kernel.run("const a: number = 1\nconst b: string = a");
  assert.equal(typed.reply["ename"], "TypeScript");
  assert.deepEqual(typed.reply["traceback"], [
    "line 2: Type 'number' is not assignable to type 'string'.",
    "    const b: string = a",
    "          ^",
  ]);
  const thrown = await kernel.run(
    "interface Wide {\n  a: number\n}\nfunction fail(w: Wide): never {\n  throw new RangeError('no')\n}\n\nfail({ a: 1 })",
  );
  assert.equal(thrown.reply["ename"], "RangeError");
  const count = thrown.reply["execution_count"];
  assert.deepEqual(thrown.reply["traceback"], [
    "RangeError: no",
    `  cell [${count}], line 5`,
    "    throw new RangeError('no')",
    `  cell [${count}], line 8`,
    "    fail({ a: 1 })",
  ]);
});

test("an error of a cell function shows its message and the user's line, no stack of Lagbook's", async () => {
  const { reply } = await kernel.run("\nlag('fare', -1)");
  assert.equal(reply["ename"], "InputError");
  assert.deepEqual(reply["traceback"].slice(1), [
    `  cell [${reply["execution_count"]}], line 2`,
    "    lag('fare', -1)",
  ]);
});

test("silent runs count nothing and show nothing; user expressions are answered", async () => {
  const before = (await kernel.run("0")).reply["execution_count"];
  const silent = await kernel.run("7", { silent: true });
  assert.equal(silent.reply["execution_count"], before);
  assert.deepEqual(silent.outputs, []);
  const { reply } = await kernel.run("const five = 5", {
    user_expressions: { twice: "five * 2", wrong: "nowhere" },
  });
  assert.equal(reply["execution_count"], before + 1);
  assert.deepEqual(reply["user_expressions"].twice, {
    status: "ok",
    data: { "text/plain": "10" },
    metadata: {},
  });
  assert.equal(reply["user_expressions"].wrong.status, "error");
});

test("a failing cell aborts the cells that were waiting, unless told not to", async () => {
  const content = { silent: false, store_history: true };
  const failing = await kernel.send("execute_request", {
    code: "throw new Error('first')",
    ...content,
    stop_on_error: true,
  });
  const waiting = await kernel.send("execute_request", { code: "1", ...content });
  assert.equal((await kernel.reply(failing)).content["status"], "error");
  assert.equal((await kernel.reply(waiting)).content["status"], "aborted");
  const lenient = await kernel.send("execute_request", {
    code: "throw new Error('second')",
    ...content,
    stop_on_error: false,
  });
  const next = await kernel.send("execute_request", { code: "2", ...content });
  assert.equal((await kernel.reply(lenient)).content["status"], "error");
  assert.equal((await kernel.reply(next)).content["status"], "ok");
});

test("a display is updated in its place", async () => {
  const { outputs } = await kernel.run("const shown = await display('one')\nawait shown.update('two')");
  const [first, second] = outputs.filter(({ type }) => type.endsWith("display_data"));
  assert.equal(first!.type, "display_data");
  assert.equal(second!.type, "update_display_data");
  assert.equal(first!.content["transient"].display_id, second!.content["transient"].display_id);
  assert.equal(second!.content["data"]["text/plain"], "'two'");
});

test("a question reaches the person and the answer the cell", async () => {
  kernel.answer = (prompt, password) => `${prompt} ${password}`;
  const { outputs } = await kernel.run("ask('who?', { hidden: true })");
  assert.equal(result(outputs), "'who? true'");
});

test("places are counted in code points, on the way in and out", async () => {
  await kernel.run("const café = { naïve: 1 }");
  const code = "/* 🚢🚢 */ café.na";
  const { content } = await kernel.request("complete_request", { code, cursor_pos: [...code].length });
  assert.deepEqual(content["matches"], ["naïve"]);
  assert.equal(content["cursor_end"], [...code].length);
  assert.equal(content["cursor_start"], [...code].length - 2);
  assert.equal(content["metadata"]._jupyter_types_experimental[0].type, "property");
});

test("inside a string the columns of the table at hand are offered", async () => {
  await kernel.run(
    "const boats = await load([{ week: '2024-W01', riders: 1, 'rain (mm)': 2 }, { week: '2024-W02', riders: 2, 'rain (mm)': 3 }], { time: 'week' })",
  );
  for (const code of ["fit(boats, 'ri", "boats.column('ri", "fit(boats, 'riders', [lag('ra"]) {
    const { content } = await kernel.request("complete_request", { code, cursor_pos: code.length });
    assert.deepEqual(content["matches"], code.endsWith("ra") ? ["rain (mm)"] : ["riders"], code);
  }
});

test("inspection gives type and documentation of a cell function, within its call too", async () => {
  for (const code of ["lag", "lag('fare', "]) {
    const { content } = await kernel.request("inspect_request", {
      code,
      cursor_pos: code.length,
      detail_level: 0,
    });
    assert.equal(content["found"], true, code);
    assert.match(
      content["data"]["text/plain"],
      /lag\(term: TermLike, steps\?: number( \| undefined)?\): Term/,
    );
    assert.match(content["data"]["text/plain"], /in time and not in rows/);
  }
});

test("a user's own name replaces a cell function's", async () => {
  await kernel.run("const trend = 3");
  assert.equal(result((await kernel.run("trend + 1")).outputs), "4");
});

test("names of earlier cells survive shorthand, export and a failing cell", async () => {
  await kernel.run("export const n = 5");
  assert.equal(result((await kernel.run("({ n })")).outputs), "{ n: 5 }");
  await kernel.run("const half = 1\nthrow new Error('after half')");
  assert.equal(result((await kernel.run("half")).outputs), "1");
});

test("packages of the notebook's folder can be imported, CommonJS and ESM", async () => {
  assert.equal(
    result((await kernel.run("import { Matrix } from 'ml-matrix'\nMatrix.eye(2).trace()")).outputs),
    "2",
  );
  assert.equal(
    result(
      (await kernel.run("import { mean as average } from 'simple-statistics'\naverage([1, 3])")).outputs,
    ),
    "2",
  );
  assert.equal(
    result((await kernel.run("import * as vegaLite from 'vega-lite'\ntypeof vegaLite.compile")).outputs),
    "'function'",
  );
});

test("process.exit is trapped, and output after the end belongs to the cell that started it", async () => {
  const { reply } = await kernel.run("process.exit(3)");
  assert.match(reply["evalue"], /not for cells/);
  const id = await kernel.send("execute_request", {
    code: "setTimeout(() => console.log('late'), 200)\nundefined",
    silent: false,
  });
  await kernel.reply(id);
  const other = await kernel.run("'other'");
  assert.equal(texts(other.outputs, "stdout"), "");
  await kernel.until(() =>
    kernel.published.find((seen) => seen.parent === id && seen.content["text"] === "late\n"),
  );
});

test("much output is gathered into few messages", async () => {
  const { outputs } = await kernel.run("for (let i = 0; i < 20000; i++) console.log(i)");
  const streams = outputs.filter(({ type }) => type === "stream");
  assert.ok(streams.length < 500, `${streams.length} messages`);
  assert.equal(texts(outputs, "stdout").split("\n").length, 20_001);
});

test("history gives what was run", async () => {
  await kernel.run("'marked in history'");
  const { content } = await kernel.request("history_request", {
    hist_access_type: "tail",
    n: 1,
    raw: true,
    output: false,
  });
  assert.equal(content["history"][0][2], "'marked in history'");
});
