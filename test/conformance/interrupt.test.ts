import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { setTimeout as wait } from "node:timers/promises";
import { KernelClient } from "../support/kernel-client.js";

let kernel: KernelClient;
before(async () => {
  kernel = await KernelClient.start();
  await kernel.run("let kept = 41");
});
after(async () => {
  assert.equal(await kernel.close(), 0);
});

for (const [what, code] of [
  ["a synchronous loop", "while (true) {}"],
  ["a pending await", "await new Promise(() => {})"],
  ["a promise as last value", "new Promise(() => {})"],
  ["a loop after an await", "await null\nwhile (true) {}"],
] as const) {
  test(`${what} stops at interrupt; heartbeat and control answer meanwhile; variables survive`, async () => {
    const id = await kernel.send("execute_request", { code, silent: false, store_history: true });
    await kernel.until(() =>
      kernel.published.find((seen) => seen.parent === id && seen.type === "execute_input"),
    );
    await wait(150);
    await kernel.beat();
    const info = await kernel.request("kernel_info_request", {}, "control");
    assert.equal(info.content["status"], "ok");
    const interrupt = await kernel.request("interrupt_request", {}, "control");
    assert.deepEqual(interrupt.content, { status: "ok" });
    const { content } = await kernel.reply(id, 5000);
    assert.equal(content["status"], "error");
    assert.equal(content["ename"], "Interrupted");
    const { outputs } = await kernel.run("kept + 1");
    assert.equal(outputs.find(({ type }) => type === "execute_result")?.content["data"]["text/plain"], "42");
  });
}

test("output of a computing cell reaches the front end before the cell ends", async () => {
  const id = await kernel.send("execute_request", {
    code: "console.log('begun')\nwhile (true) {}",
    silent: false,
  });
  await kernel.until(() => kernel.published.find((seen) => seen.parent === id && seen.type === "stream"));
  await kernel.request("interrupt_request", {}, "control");
  await kernel.reply(id, 5000);
});

test("an interrupt with nothing to interrupt does no harm", async () => {
  await kernel.request("interrupt_request", {}, "control");
  const { reply } = await kernel.run("1");
  assert.equal(reply["status"], "ok");
});
