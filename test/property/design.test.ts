import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import { load, mean, type TimeTable } from "../../src/data/index.js";
import {
  columnsOf,
  design,
  diff,
  lag,
  lead,
  log,
  product,
  rolling,
  type TermLike,
  times,
} from "../../src/design/index.js";
import {
  between,
  classical,
  fit,
  fourier,
  pulse,
  ramp,
  seasonal,
  standardise,
  step,
  trend,
} from "../../src/index.js";
import { counterRandom } from "../../src/numeric/index.js";
import { agree } from "../support/digits.js";

const settings = { seed: 23, numRuns: 60 };
const seeds = fc.nat(1e6);

/** Months from 2000-01 on, of which those in `absent` have no row; a, b > 0, y. */
function months(seed: number, T: number, absent: ReadonlySet<number> = new Set()): Promise<TimeTable> {
  const random = counterRandom(seed, T);
  const rows = Array.from({ length: T }, (_, i) => ({
    month: `${2000 + Math.floor(i / 12)}-${String((i % 12) + 1).padStart(2, "0")}`,
    y: random.normal(),
    a: random.normal(),
    b: 1 + random.uniform(),
  }));
  return load(
    rows.filter((_, i) => !absent.has(i)),
    { time: "month" },
  );
}
const column = (term: TermLike, table: TimeTable) => columnsOf(term, table)[0]!;
const steps = fc.integer({ min: 0, max: 9 });
const gaps = fc.uniqueArray(fc.integer({ min: 1, max: 28 }), { maxLength: 8 });

test("a lag in a table with gaps is the value that stands that many periods before, or none", () =>
  fc.assert(
    fc.asyncProperty(seeds, gaps, fc.integer({ min: -9, max: 9 }), async (seed, absent, by) => {
      const table = await months(seed, 30, new Set(absent));
      const { ordinals } = table.index;
      const values = table.numbers("a");
      const found = column(by >= 0 ? lag("a", by) : lead("a", -by), table);
      ordinals.forEach((ordinal, row) => {
        const source = ordinals.indexOf(ordinal - by);
        assert.equal(found.values[row], source < 0 ? Number.NaN : values[source]);
        const outside = ordinal - by < ordinals[0]! || ordinal - by > ordinals.at(-1)!;
        assert.equal(found.edge?.[row] ?? 0, outside ? 1 : 0);
      });
    }),
    settings,
  ));

test("lags add up, and commute with logarithms, multiples, differences and rolling means", () =>
  fc.assert(
    fc.asyncProperty(seeds, gaps, steps, steps, async (seed, absent, m, n) => {
      const table = await months(seed, 30, new Set(absent));
      const makers: ((term: TermLike) => TermLike)[] = [
        (term) => lag(term, n),
        log,
        (term) => times(term, 3),
        (term) => diff(term, { over: 2 }),
        (term) => rolling(term, mean, 3),
      ];
      for (const make of makers) {
        const outside = column(lag(make("b"), m), table);
        const inside = column(make(lag("b", m)), table);
        assert.equal(outside.label, inside.label);
        assert.deepEqual(outside.values, inside.values);
        assert.deepEqual(outside.uses, inside.uses);
      }
      const both = column(lag("b", m + n), table);
      assert.equal(column(lag(lag("b", m), n), table).label, both.label);
    }),
    settings,
  ));

test("the lag of a term of time alone is what the longer table shows", () =>
  fc.assert(
    fc.asyncProperty(seeds, steps, fc.integer({ min: 12, max: 20 }), async (seed, by, at) => {
      const long = await months(seed, 40);
      const short = long.between("2000-11"); // ten months later: no lag reaches beyond the long table
      const name = `${2000 + Math.floor(at / 12)}-${String((at % 12) + 1).padStart(2, "0")}`;
      for (const term of [
        seasonal(),
        fourier(2),
        step(name),
        pulse(name),
        ramp(name),
        between(name, "2002"),
      ]) {
        const wanted = columnsOf(lag(term, by), long).map(({ values }) => values.slice(10));
        const found = columnsOf(lag(term, by), short);
        found.forEach(({ values, edge }, j) => {
          assert.deepEqual(values, wanted[j]);
          assert.equal(edge?.some(Boolean) ?? false, false);
        });
      }
    }),
    settings,
  ));

test("a difference undone by its sum gives the column back", () =>
  fc.assert(
    fc.asyncProperty(seeds, async (seed) => {
      const table = await months(seed, 30);
      const changes = column(diff("a"), table).values;
      let level = table.numbers("a")[0]!;
      const back = changes.slice(1).map((change) => {
        level += change;
        return level + 10;
      });
      agree(
        back,
        table
          .numbers("a")
          .slice(1)
          .map((value) => value + 10),
        13,
      );
    }),
    settings,
  ));

test("products commute", () =>
  fc.assert(
    fc.asyncProperty(seeds, steps, async (seed, by) => {
      const table = await months(seed, 30);
      const one = column(product(lag("a", by), "b"), table);
      const other = column(product("b", lag("a", by)), table);
      assert.deepEqual([one.values, one.edge], [other.values, other.edge]);
    }),
    settings,
  ));

test("seasons by base, by their mean, each on its own, or as all waves: one and the same fit", () =>
  fc.assert(
    fc.asyncProperty(seeds, fc.integer({ min: 30, max: 80 }), async (seed, T) => {
      const table = await months(seed, T);
      const options = { covariance: classical() };
      const base = fit(table, "y", ["a", seasonal()], options);
      const others = [
        fit(table, "y", ["a", seasonal({ contrast: "sum-to-zero" })], options),
        fit(table, "y", ["a", seasonal({ contrast: "all" })], { ...options, intercept: false }),
        fit(table, "y", ["a", fourier(6)], options),
      ];
      for (const other of others) {
        agree(
          [other.rss, other.rSquared.value, other.coefficient("a").estimate, other.coefficient("a").se],
          [base.rss, base.rSquared.value, base.coefficient("a").estimate, base.coefficient("a").se],
          10,
        );
        assert.equal(other.rSquared.about, "mean");
      }
    }),
    settings,
  ));

test("moving or stretching what enters changes its coefficients and nothing that is said of it", () =>
  fc.assert(
    fc.asyncProperty(seeds, async (seed) => {
      const table = await months(seed, 40);
      const plain = fit(table, "y", ["a", trend()], { covariance: classical() });
      const other = fit(table, "y", [standardise("a"), standardise(trend())], { covariance: classical() });
      for (const j of [1, 2])
        agree(
          [other.coefficients[j]!.statistic, other.coefficients[j]!.p],
          [plain.coefficients[j]!.statistic, plain.coefficients[j]!.p],
          9,
        );
      agree(
        other.fitted.map((v) => v + 10),
        plain.fitted.map((v) => v + 10),
        12,
      );
    }),
    settings,
  ));

test("periods left out are those that the table would drop, and a sample is what a part of the table has", () =>
  fc.assert(
    fc.asyncProperty(seeds, fc.uniqueArray(fc.nat(39), { maxLength: 10 }), async (seed, holes) => {
      const table = (await months(seed, 40)).define({ a: (r, i) => (holes.includes(i) ? null : r["a"]) });
      const left = design(table, "y", ["a", "b"], { missing: "leave out" });
      const dropped = design(table.dropMissing("a"), "y", ["a", "b"]);
      assert.deepEqual([left.X, left.y, left.periods], [dropped.X, dropped.y, dropped.periods]);
      assert.equal(left.left.length, holes.length);
      const sample = design(table, "y", "b", { sample: ["2000-06", "2002-02"] });
      const part = design(table.between("2000-06", "2002-02"), "y", "b");
      assert.deepEqual([sample.X, sample.y, sample.periods], [part.X, part.y, part.periods]);
    }),
    settings,
  ));
