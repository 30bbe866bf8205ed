import assert from "node:assert/strict";
import { test } from "node:test";
import { Worker } from "node:worker_threads";
import { answerMemory, giveAnswer, takeAnswer } from "../../../kernel/wire/answer.js";
import { SharedState, shareState } from "../../../kernel/wire/shared.js";

test("an answer comes back whole, none as undefined, and one too long is said", () => {
  const asked = (answer: string | undefined) => {
    const memory = answerMemory();
    giveAnswer(memory, answer);
    return () => takeAnswer(memory);
  };
  assert.equal(asked("Zoë 🚢")(), "Zoë 🚢");
  assert.equal(asked("")(), "");
  assert.equal(asked(undefined)(), undefined);
  assert.equal(asked("x".repeat(65_536))()?.length, 65_536);
  assert.throws(asked("é".repeat(40_000)), /longer than 65536 bytes/);
});

test("text is held back while too much is on its way, until the other thread has sent some", async () => {
  const memory = shareState();
  const state = new SharedState(memory);
  state.handOver(500_001);
  const worker = new Worker(
    `const { workerData } = require("node:worker_threads");
     const numbers = new Int32Array(workerData);
     setTimeout(() => { Atomics.store(numbers, 1, 1); Atomics.sub(numbers, 0, 1000); Atomics.notify(numbers, 0); }, 50);`,
    { eval: true, workerData: memory },
  );
  assert.equal(state.stopRequested, false);
  state.handOver(10); // returns only when the other thread has made room
  assert.equal(state.stopRequested, true);
  await worker.terminate();
  state.stopRequested = false;
  assert.equal(state.stopRequested, false);
});
