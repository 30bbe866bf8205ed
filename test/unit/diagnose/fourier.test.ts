import { test } from "node:test";
import { periodogram } from "../../../src/diagnose/parts/fourier.js";
import { agree, noise } from "./subject.js";

test("the periodogram of any length equals the sum written out, 10 digits", () => {
  for (const T of [1, 2, 3, 12, 97, 128, 180]) {
    const x = noise(T, T);
    const found = periodogram(x);
    found.forEach((value, j) => {
      let re = 0;
      let im = 0;
      x.forEach((v, t) => {
        re += v * Math.cos((2 * Math.PI * j * t) / T);
        im -= v * Math.sin((2 * Math.PI * j * t) / T);
      });
      agree(value + 1, re * re + im * im + 1, 10, `T ${T}, j ${j}`);
    });
  }
});
