import assert from "node:assert/strict";
import { test } from "node:test";
import { Collector } from "../../../kernel/rerun/collector.js";

test("stretches of one stream are joined, another output parts them", () => {
  const collector = new Collector();
  const outputs = collector.begin();
  collector.take({ type: "stream", name: "stdout", text: "a" });
  collector.take({ type: "stream", name: "stdout", text: "b\n" });
  collector.take({ type: "stream", name: "stderr", text: "!" });
  collector.take({ type: "stream", name: "stdout", text: "c" });
  assert.deepEqual(
    outputs.map((output) => output.output_type === "stream" && [output.name, output.text]),
    [
      ["stdout", "ab\n"],
      ["stderr", "!"],
      ["stdout", "c"],
    ],
  );
});

test("an update replaces every display of its id, in earlier cells too, and adds no output", () => {
  const collector = new Collector();
  const first = collector.begin();
  const show = (text: string, id?: string) =>
    collector.take({
      type: "display_data",
      data: { "text/plain": text },
      metadata: { m: text },
      ...(id === undefined ? {} : { transient: { display_id: id } }),
    });
  show("0 %", "p");
  show("other", "q");
  const second = collector.begin();
  show("0 % again", "p");
  collector.take({
    type: "update_display_data",
    data: { "text/plain": "100 %" },
    transient: { display_id: "p" },
  });
  collector.take({
    type: "update_display_data",
    data: { "text/plain": "lost" },
    transient: { display_id: "none" },
  });
  const shown = (outputs: typeof first) =>
    outputs.map((output) => "data" in output && output.data["text/plain"]);
  assert.deepEqual(shown(first), ["100 %", "other"]);
  assert.deepEqual(shown(second), ["100 %"]);
  assert.ok(!("transient" in first[0]!), "ids are not written to the file");
});

test("a clearing takes effect at once, or waits for the next output", () => {
  const collector = new Collector();
  const outputs = collector.begin();
  collector.take({ type: "stream", name: "stdout", text: "a" });
  collector.take({ type: "clear_output", wait: true });
  assert.equal(outputs.length, 1);
  collector.take({ type: "stream", name: "stdout", text: "b" });
  assert.deepEqual(outputs, [{ output_type: "stream", name: "stdout", text: "b" }]);
  collector.take({ type: "clear_output", wait: false });
  assert.deepEqual(outputs, []);
});

test("results and errors keep their fields", () => {
  const collector = new Collector();
  const outputs = collector.begin();
  collector.take({ type: "execute_result", data: { "text/plain": "2" }, execution_count: 7 });
  collector.take({ type: "error", ename: "E", evalue: "v", traceback: ["l1", "l2"] });
  assert.deepEqual(outputs, [
    { output_type: "execute_result", data: { "text/plain": "2" }, metadata: {}, execution_count: 7 },
    { output_type: "error", ename: "E", evalue: "v", traceback: ["l1", "l2"] },
  ]);
});
