import assert from "node:assert/strict";
import { test } from "node:test";
import { timeLine } from "../../../../src/show/chart/gaps.js";
import { missingStrip } from "../../../../src/show/chart/missing-strip.js";
import { spark } from "../../../../src/show/chart/spark.js";
import { thin } from "../../../../src/show/chart/thin.js";
import { svgFaults } from "../markup.js";

test("short lines keep all their points", () => {
  const few = thin({ x: [0, 1, 2], y: [5, Number.NaN, 7] }, 100);
  assert.deepEqual([...few.x], [0, 1, 2]);
  assert.equal(few.thinned, false);
});

test("a long line keeps its ends, its extremes and its holes", () => {
  const n = 100_000;
  const x = Float64Array.from({ length: n }, (_, i) => i);
  const y = x.map((i) => Math.sin(i / 50));
  y[31_416] = 9;
  y[77_777] = -8;
  y[50_000] = Number.NaN;
  const few = thin({ x, y }, 400);
  assert.ok(few.thinned);
  assert.equal(few.from, n);
  assert.ok(few.x.length <= 5 * 400);
  assert.equal(few.x[0], 0);
  assert.equal(few.x[few.x.length - 1], n - 1);
  assert.equal(Math.max(...few.y.filter((v) => !Number.isNaN(v))), 9);
  assert.equal(Math.min(...few.y.filter((v) => !Number.isNaN(v))), -8);
  assert.ok(few.y.some(Number.isNaN));
  for (let i = 1; i < few.x.length; i++) assert.ok(few.x[i]! > few.x[i - 1]!);
});

test("every stretch keeps its lowest and highest point", () => {
  const n = 10_000;
  const x = Float64Array.from({ length: n }, (_, i) => i);
  const y = x.map((i) => (i * 7919) % 1000);
  const few = thin({ x, y }, 10);
  const width = (n - 1) / 10;
  for (let bin = 0; bin < 10; bin++) {
    const inside = (at: number) => at >= bin * width && (bin === 9 || at < (bin + 1) * width);
    const all = [...y.filter((_, i) => inside(i))];
    const kept = [...few.y.filter((_, i) => inside(few.x[i]!))];
    assert.equal(Math.max(...kept), Math.max(...all));
    assert.equal(Math.min(...kept), Math.min(...all));
  }
});

test("absent periods break a line, and rows out of order are put in order", () => {
  const { x, y } = timeLine([0, 1, 5, 6], [1, 2, 3, 4]);
  assert.deepEqual([...x], [0, 1, 2, 5, 6]);
  assert.ok(Number.isNaN(y[2]!));
  const sorted = timeLine([3, 1, 2], [30, 10, 20]);
  assert.deepEqual([...sorted.x], [1, 2, 3]);
  assert.deepEqual([...sorted.y], [10, 20, 30]);
});

test("absent periods break a thinned line too", () => {
  const n = 10_000;
  const x = Float64Array.from({ length: n }, (_, i) => (i < 5000 ? i : i + 77));
  const few = timeLine(x, x, 50);
  assert.ok(few.thinned);
  const hole = few.y.findIndex(Number.isNaN);
  assert.ok(hole > 0);
  assert.ok(few.x[hole - 1]! <= 4999 && few.x[hole + 1]! >= 5077);
  assert.equal(few.y.filter(Number.isNaN).length, 1);
});

test("a small line breaks at missing values, shows lone points and marks filled ones", () => {
  const nan = Number.NaN;
  const svg = spark([0, 1, 2, 3, 4, 5], [1, 2, nan, 3, nan, 4], [0, 1, 0, 0, 0, 0]);
  assert.deepEqual(svgFaults(svg), []);
  const path = /<path d="(M[^"]*)" fill="none"/.exec(svg)![1]!;
  assert.equal(path.match(/M/g)!.length, 3);
  assert.equal(svg.match(/<circle/g)!.length, 2);
  assert.match(svg, /#D55E00/);
});

test("small lines of constants, of nothing and of huge numbers are drawn", () => {
  for (const y of [[2, 2, 2], [Number.NaN, Number.NaN, Number.NaN], [-1.7e308, 0, 1.7e308], []]) {
    const svg = spark([0, 1, 2].slice(0, y.length), y);
    assert.deepEqual(svgFaults(svg), []);
    assert.doesNotMatch(svg, /NaN|Infinity/);
  }
});

test("a strip shows every missing stretch, however short", () => {
  const svg = missingStrip(0, 99_999, [
    { first: 10, last: 10 },
    { first: 50_000, last: 60_000 },
  ]);
  assert.deepEqual(svgFaults(svg), []);
  const frames = /<path d="([^"]*)" fill="none"/.exec(svg)![1]!;
  assert.equal(frames.match(/M/g)!.length, 2);
  assert.match(missingStrip(0, 9, []), /fill="none"/);
});
