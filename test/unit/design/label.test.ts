import assert from "node:assert/strict";
import { test } from "node:test";
import {
  type Labelled,
  movedLabel,
  multipleLabel,
  operatorLabel,
  productLabel,
  subscript,
  superscript,
} from "../../../src/design/label.js";

const fare: Labelled = { label: "fare" };
const rain: Labelled = { label: "rain" };

test("a move of a move is one move, and back again none", () => {
  const one = movedLabel(fare, 1);
  assert.equal(one.label, "fare (t−1)");
  assert.equal(movedLabel(one, 2).label, "fare (t−3)");
  assert.equal(movedLabel(one, -3).label, "fare (t+2)");
  assert.equal(movedLabel(one, -1).label, "fare");
});

test("what an operator makes of a lag is written as the lag of what it makes", () => {
  const logged = operatorLabel("log", movedLabel(fare, 1));
  assert.equal(logged.label, "log fare (t−1)");
  assert.equal(movedLabel(logged, 1).label, "log fare (t−2)");
  assert.equal(movedLabel(operatorLabel("log", fare), 1).label, "log fare (t−1)");
});

test("brackets where an operator takes several parts together", () => {
  const both = productLabel(fare, rain);
  assert.equal(both.label, "fare × rain");
  assert.equal(movedLabel(both, 1).label, "(fare × rain) (t−1)");
  assert.equal(operatorLabel("log", both).label, "log (fare × rain)");
  assert.equal(productLabel(fare, movedLabel(rain, 1)).label, "fare × rain (t−1)");
  assert.equal(operatorLabel("log", multipleLabel(100, fare)).label, "log (100 × fare)");
  assert.equal(movedLabel(multipleLabel(-0.5, fare), 1).label, "−0.5 × fare (t−1)");
  assert.equal(productLabel(fare, fare).label, "fare²");
});

test("a name that looks like a lag, a product or a logarithm is a name", () => {
  assert.equal(movedLabel({ label: "fare (t−1)" }, 1).label, "fare (t−1) (t−1)");
  assert.equal(operatorLabel("Δ", { label: "a × b" }).label, "Δ a × b");
});

test("figures above and below the line", () => {
  assert.equal(superscript(10), "¹⁰");
  assert.equal(subscript(52), "₅₂");
});
