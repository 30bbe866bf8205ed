import assert from "node:assert/strict";
import { test } from "node:test";
import { Interrupted, Interruption, isInterrupted } from "../../../kernel/session/interruption.js";
import { runScript } from "../../../kernel/session/run-script.js";

const never = new Promise<never>(() => {});

test("a request ends the present wait, or else the next, once", async () => {
  const interruption = new Interruption();
  assert.equal(await interruption.orInterrupted(5), 5);
  const wait = interruption.orInterrupted(never);
  interruption.request();
  await assert.rejects(wait, Interrupted);
  assert.equal(interruption.requested, true);
  assert.equal(await interruption.orInterrupted(Promise.resolve(6)), 6);
  interruption.request();
  await assert.rejects(interruption.orInterrupted(7), isInterrupted);
  await assert.rejects(interruption.orInterrupted(Promise.reject(new RangeError("own"))), RangeError);
});

test("an interrupted cell ends where it waits: finally blocks run, handlers and the rest do not", async () => {
  const said: string[] = [];
  const say = (word: string) => said.push(word);
  const interruption = new Interruption();
  const script = `try { yield never; say("went on"); } catch { say("caught"); } finally { say(yield late); } say("rest");`;
  const given = { say, never, late: Promise.resolve("tidied") };
  const cell = runScript({ script, style: "generator" }, "cell.js", given, interruption);
  interruption.request();
  await assert.rejects(cell as Promise<void>, Interrupted);
  assert.deepEqual(said, ["tidied"]);
});

test("what an await rejects with arrives at the await", async () => {
  const script = `try { yield broken; } catch (error) { result.said = error.message; }`;
  const result: { said?: string } = {};
  const given = { broken: Promise.reject(new Error("broken")), result };
  await runScript({ script, style: "generator" }, "cell.js", given, new Interruption());
  assert.equal(result.said, "broken");
});
