import assert from "node:assert/strict";
import { test } from "node:test";
import { matrix } from "../../../../src/numeric/index.js";
import { axisFor, roundStep } from "../../../../src/show/card/axis.js";
import { effectAxis } from "../../../../src/show/card/effect-axis.js";
import { axisHead, drawInterval, drawSpan } from "../../../../src/show/card/interval.js";
import { faults } from "../markup.js";

/** Left and width of the line of a drawn interval, in percent. */
function line(markup: string): readonly [number, number] {
  const match = /left:([\d.]+)%;width:([\d.]+)%;top:50%/.exec(markup);
  assert.ok(match, markup);
  return [Number(match[1]), Number(match[2])];
}

test("an axis holds its intervals, zero and round ticks", () => {
  const axis = axisFor([
    { low: 0.2, high: 1.4 },
    { low: -0.3, high: 0.1 },
  ]);
  assert.ok(axis.from < -0.3 && axis.to > 1.4);
  assert.ok(axis.ticks.includes(0));
  assert.deepEqual(axis.ticks, [0, 1]);
  assert.equal(axis.position(axis.from), 0);
  assert.ok(Math.abs(axis.position(axis.to) - 100) < 1e-9);
});

test("zero is left off where it would press the intervals together, if that is asked for", () => {
  assert.ok(axisFor([{ low: 100, high: 101 }]).from < 0);
  const near = axisFor([{ low: 100, high: 101 }], 2);
  assert.ok(near.from > 99);
  assert.match(axisHead(near, "x").markup, /← 0/);
  assert.ok(axisFor([{ low: 1, high: 2 }], 2).from < 0);
});

test("an axis for nothing, for one value and for what is not finite", () => {
  for (const axis of [
    axisFor([]),
    axisFor([{ low: 0, high: 0 }]),
    axisFor([{ low: Number.NaN, high: Number.NaN }]),
    axisFor([{ low: Number.NEGATIVE_INFINITY, high: Number.POSITIVE_INFINITY }]),
  ]) {
    assert.ok(axis.from < 0 && axis.to > 0);
    assert.ok(axis.ticks.length >= 1 && axis.ticks.length <= 5);
  }
});

test("steps are round", () => {
  assert.equal(roundStep(470), 500);
  assert.equal(roundStep(0.021), 0.025);
  assert.equal(roundStep(6), 10);
  assert.equal(roundStep(1), 1);
});

test("an interval is drawn where it is", () => {
  const axis = axisFor([{ low: -1, high: 3 }]);
  const { markup } = drawInterval(axis, { estimate: 1, low: 0.5, high: 1.5 });
  assert.deepEqual(faults(markup), []);
  const [left, width] = line(markup);
  assert.ok(Math.abs(left - axis.position(0.5)) < 0.01);
  assert.ok(Math.abs(left + width - axis.position(1.5)) < 0.01);
});

test("an interval without zero looks other than one with it, in shape and not in colour alone", () => {
  const axis = axisFor([{ low: -1, high: 3 }]);
  const sure = drawInterval(axis, { estimate: 1, low: 0.5, high: 1.5 }).markup;
  const unsure = drawInterval(axis, { estimate: 1, low: -0.5, high: 2.5 }).markup;
  assert.match(sure, /border:5px solid/);
  assert.match(unsure, /border:2px solid/);
});

test("what lies beyond the axis ends in an arrow and has no point", () => {
  const axis = axisFor([{ low: -1, high: 1 }]);
  const beyond = drawInterval(axis, { estimate: 50, low: 40, high: 60 }).markup;
  assert.match(beyond, /right:0;.*border-left:7px solid/);
  assert.doesNotMatch(beyond, /border-radius/);
  assert.deepEqual(faults(beyond), []);
  const across = drawInterval(axis, { estimate: 0, low: -40, high: 60 }).markup;
  assert.match(across, /border-right:7px/);
  assert.match(across, /border-left:7px/);
});

test("an interval that is not there leaves the mark of zero only", () => {
  const nan = Number.NaN;
  const { markup } = drawInterval(axisFor([{ low: -1, high: 1 }]), { estimate: 1, low: nan, high: nan });
  assert.match(markup, /dashed/);
  assert.doesNotMatch(markup, /solid/);
});

test("a span of intervals", () => {
  const axis = axisFor([{ low: -2, high: 2 }]);
  for (const filled of ["full", "half", "none"] as const) {
    const { markup } = drawSpan(axis, { estimate: 0.5, outer: [-1, 2], inner: [0, 1], filled });
    assert.deepEqual(faults(markup), []);
    assert.equal(markup.match(/top:50%/g)?.length, 3);
  }
});

test("coefficients in unlike units are drawn per standard deviation of their term", () => {
  const T = 4;
  const X = matrix(T, 3, Float64Array.from([1, 1, 1, 1, 0, 1, 0, 1, 0, 1000, 0, 1000]));
  const about = { X, T, interceptAt: 0 };
  const alike = [
    { estimate: 9, low: 8, high: 10 },
    { estimate: 1, low: 0, high: 2 },
    { estimate: 2, low: 1, high: 3 },
  ];
  assert.deepEqual(effectAxis(alike, about).factors, [1, 1, 1]);
  const unlike = [alike[0]!, alike[1]!, { estimate: 0.002, low: 0.001, high: 0.003 }];
  const { factors, axis, title } = effectAxis(unlike, about);
  // Standard deviation of 0, 1, 0, 1 is √(1/3).
  assert.ok(Math.abs(factors[1]! - Math.sqrt(1 / 3)) < 1e-15);
  assert.ok(Math.abs(factors[2]! - 1000 * Math.sqrt(1 / 3)) < 1e-12);
  assert.match(title, /standard deviation/);
  // The intercept does not stretch the axis.
  assert.ok(axis.to < 3);
});
