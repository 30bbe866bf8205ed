import assert from "node:assert/strict";
import { test } from "node:test";
import { runInThisContext } from "node:vm";
import { startWatchdog } from "../../../kernel/rerun/watchdog.js";

test("a busy thread is stopped by the signal, and the time is said to have run out", async () => {
  let asked = 0;
  const watchdog = startWatchdog(0.05, () => asked++, 50);
  watchdog.watch("Cell 1");
  // The loop never gives the thread back: only the watching thread can end it.
  assert.throws(() => runInThisContext("while (true) {}", { breakOnSigint: true }), {
    code: "ERR_SCRIPT_EXECUTION_INTERRUPTED",
  });
  assert.equal(watchdog.rest(), true);
  assert.equal(watchdog.rest(), false, "each cell has its own clock");
  await watchdog.close();
  assert.ok(asked <= 1);
});

test("an idle thread is asked, not signalled", async () => {
  const signals: string[] = [];
  const onSignal = (signal: string) => signals.push(signal);
  process.on("SIGINT", onSignal);
  const asked = new Promise<void>((settle) => {
    const watchdog = startWatchdog(0.02, () => settle(), 50);
    watchdog.watch("Cell 1");
    void new Promise((later) => setTimeout(later, 200)).then(() => watchdog.close());
  });
  await asked;
  await new Promise((later) => setTimeout(later, 150));
  process.off("SIGINT", onSignal);
  assert.deepEqual(signals, []);
});

test("a cell within its time is left alone", async () => {
  let asked = 0;
  const watchdog = startWatchdog(0.1, () => asked++);
  watchdog.watch("Cell 1");
  assert.equal(watchdog.rest(), false);
  await new Promise((later) => setTimeout(later, 200));
  await watchdog.close();
  assert.equal(asked, 0);
});
