import assert from "node:assert/strict";
import { test } from "node:test";
import { counterRandom } from "../../../src/numeric/index.js";
import { philox } from "../../../src/numeric/random.js";

// Known answers published with the generator (Salmon et al. 2011, file kat_vectors, philox4x32 with 10 rounds); values
// from memory, and the first two of the three confirmed by two independent programs.
for (const [counter, key, answer] of [
  [
    [0, 0, 0, 0],
    [0, 0],
    [0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8],
  ],
  [
    [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344],
    [0xa4093822, 0x299f31d0],
    [0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1],
  ],
] as const) {
  test(`Philox 4×32-10 of counter ${counter[0].toString(16)}`, () => {
    const words = new Uint32Array(counter);
    philox(words, key[0], key[1]);
    assert.deepEqual([...words], [...answer]);
  });
}

test("a replicate's stream does not depend on how it is asked for", () => {
  const one = counterRandom(42, 7);
  const whole = one.fillNormal(new Float64Array(100));
  const other = counterRandom(42, 7);
  const parts = [
    ...other.fillNormal(new Float64Array(33)),
    other.normal(),
    ...other.fillNormal(new Float64Array(66)),
  ];
  assert.deepEqual([...whole], parts);
  assert.notDeepEqual([...counterRandom(42, 8).fillNormal(new Float64Array(100))], [...whole]);
});

test("uniforms and normals have the moments they should, within five standard errors", () => {
  const n = 200_000;
  const random = counterRandom(1, 1);
  let mean = 0;
  let square = 0;
  let fourth = 0;
  for (let i = 0; i < n; i++) {
    const z = random.normal();
    mean += z / n;
    square += (z * z) / n;
    fourth += z ** 4 / n;
  }
  assert.ok(Math.abs(mean) < 5 / Math.sqrt(n));
  assert.ok(Math.abs(square - 1) < 5 * Math.sqrt(2 / n));
  assert.ok(Math.abs(fourth - 3) < 5 * Math.sqrt(96 / n));
  const counts = new Float64Array(10);
  for (let i = 0; i < n; i++) counts[random.integer(10)]!++;
  for (const count of counts) assert.ok(Math.abs(count - n / 10) < 5 * Math.sqrt(n * 0.09));
});
