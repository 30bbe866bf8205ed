import assert from "node:assert/strict";
import { test } from "node:test";
import { joined, NotebookError, parseNotebook, writeNotebook } from "../../../kernel/rerun/notebook.js";

const minimal = (cells: unknown[]) => JSON.stringify({ nbformat: 4, nbformat_minor: 5, metadata: {}, cells });

test("a notebook comes back as it went, in the layout that Jupyter writes", () => {
  const cell = {
    cell_type: "code",
    execution_count: 2,
    id: "a1",
    metadata: { z: 1, a: [1, { d: 1, b: 2 }] },
    outputs: [
      { name: "stdout", output_type: "stream", text: ["one\n", "two"] },
      {
        data: { "application/vnd.x+json": { b: "kept\nwhole", a: 1 }, "text/plain": ["x\n", "\n", "y"] },
        execution_count: 2,
        metadata: {},
        output_type: "execute_result",
      },
    ],
    source: ["const a = 1\n", "a"],
  };
  const text = minimal([cell]);
  const written = writeNotebook(parseNotebook(text, "n.ipynb"));
  assert.deepEqual(JSON.parse(written), JSON.parse(text));
  assert.ok(written.endsWith("}\n"));
  assert.match(written, /^\{\n "cells": \[\n {2}\{\n {3}"cell_type": "code",/);
  assert.ok(written.indexOf('"metadata"') < written.indexOf('"outputs"'), "keys are sorted");
  assert.equal(writeNotebook(parseNotebook(written, "n.ipynb")), written);
});

test("texts held as one string are written as lines", () => {
  const written = writeNotebook(
    parseNotebook(minimal([{ cell_type: "raw", metadata: {}, source: "a\n\nb\n" }]), "n"),
  );
  assert.deepEqual(JSON.parse(written).cells[0].source, ["a\n", "\n", "b\n"]);
  assert.equal(joined(["a\n", "b"]), "a\nb");
});

test("what is no notebook is refused, with the place", () => {
  const refused = (text: string, message: RegExp) =>
    assert.throws(
      () => parseNotebook(text, "n.ipynb"),
      (problem) => problem instanceof NotebookError && message.test(problem.message),
    );
  refused("{", /n\.ipynb is not a notebook: /);
  refused("[]", /has no "nbformat"/);
  refused("null", /has no "nbformat"/);
  refused('{"nbformat":3,"worksheets":[]}', /format 3; format 4 is read/);
  refused(minimal([{ cell_type: "heading", source: "x" }]), /n\.ipynb, cell 1: cell_type is "heading"/);
  refused(minimal([{ cell_type: "code", source: 3 }]), /cell 1: source is neither/);
  refused(minimal([null]), /cell 1: cell_type/);
});
