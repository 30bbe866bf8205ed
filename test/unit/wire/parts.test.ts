import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import { toPoints, toUnits } from "../../../kernel/wire/code-points.js";
import { History } from "../../../kernel/wire/history.js";
import { interruptLadder } from "../../../kernel/wire/interrupt-ladder.js";
import type { Message } from "../../../kernel/wire/message.js";
import { GatheringPublisher } from "../../../kernel/wire/publisher.js";

test("code points and UTF-16 units are converted both ways", () => {
  fc.assert(
    fc.property(fc.string({ unit: "binary", maxLength: 30 }), (text) => {
      const points = [...text];
      for (let at = 0; at <= points.length; at++) {
        const units = points.slice(0, at).join("").length;
        assert.equal(toUnits(text, at), units);
        assert.equal(toPoints(text, units), at);
      }
    }),
    { seed: 2, numRuns: 200 },
  );
});

test("history by tail, range and search", () => {
  const history = new History();
  ["a = 1", "b = 2", "a + b", "a = 1"].forEach((input, i) => {
    history.add(i + 1, input);
  });
  const lines = (request: object) =>
    history.answer(request as Record<string, unknown>).map((entry) => (entry as unknown[])[1]);
  assert.deepEqual(lines({ hist_access_type: "tail", n: 2 }), [3, 4]);
  assert.deepEqual(lines({ hist_access_type: "range", session: 0, start: 2, stop: 4 }), [2, 3]);
  assert.deepEqual(lines({ hist_access_type: "search", pattern: "a*" }), [1, 3, 4]);
  assert.deepEqual(lines({ hist_access_type: "search", pattern: "? = ?", unique: true }), [2, 4]);
  assert.deepEqual(history.answer({ hist_access_type: "tail", n: 1, output: true }), [
    [1, 4, ["a = 1", null]],
  ]);
  history.addOutput("1");
  assert.deepEqual(history.answer({ hist_access_type: "tail", n: 1, output: true }), [
    [1, 4, ["a = 1", "1"]],
  ]);
});

test("stream text is gathered per cell and never overtakes another message", async () => {
  const sent: Message[] = [];
  let credit = 0;
  const send = async (message: Message) => void sent.push(message);
  const publisher = new GatheringPublisher(send, "s", (length) => {
    credit += length;
  });
  const parent = { msg_id: "1" } as never;
  for (const text of ["a", "b"]) publisher.publish("stream", { name: "stdout", text }, parent);
  publisher.publish("stream", { name: "stderr", text: "c" }, parent);
  publisher.publish("status", { execution_state: "idle" }, parent);
  publisher.publish("stream", { name: "stdout", text: "d" }, parent);
  await new Promise((resolve) => setTimeout(resolve, 60));
  assert.deepEqual(
    sent.map(({ header, content }) => [header.msg_type, content["text"]]),
    [
      ["stream", "ab"],
      ["stream", "c"],
      ["status", undefined],
      ["stream", "d"],
    ],
  );
  assert.equal(credit, 4);
});

test("the ladder stops at the rung that bites", (context) => {
  context.mock.timers.enable({ apis: ["setTimeout"] });
  const climb = (bites: string) => {
    const taken: string[] = [];
    let running: number | undefined = 7;
    const rung = (name: string) => () => {
      taken.push(name);
      if (name === bites) running = undefined;
    };
    interruptLadder({
      running: () => running,
      ask: rung("ask"),
      signal: rung("signal"),
      giveUp: rung("give up"),
    });
    context.mock.timers.tick(5000);
    return taken;
  };
  assert.deepEqual(climb("ask"), ["ask"]);
  assert.deepEqual(climb("signal"), ["ask", "signal"]);
  assert.deepEqual(climb("nothing"), ["ask", "signal", "signal", "give up"]);
});
