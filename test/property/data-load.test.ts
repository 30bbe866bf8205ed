import assert from "node:assert/strict";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { after, test } from "node:test";
import fc from "fast-check";
import { load } from "../../src/data/index.js";
import { sniffDialect } from "../../src/data/load/delimited/dialect.js";
import { readFast } from "../../src/data/load/delimited/fast.js";
import { kindsOf } from "../../src/data/load/delimited/kinds.js";
import { RecordSplitter, records } from "../../src/data/load/delimited/records.js";
import { readStrictly } from "../../src/data/load/delimited/strict.js";
import { missingTexts } from "../../src/data/load/options.js";

const scratch = mkdtempSync(join(tmpdir(), "lagbook-load-"));
after(() => rmSync(scratch, { recursive: true }));

const number = fc.oneof(
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc.integer({ min: -1000, max: 1000 }),
);
const text = fc
  .string({
    unit: fc.constantFrom("a", "B", " ", ",", ";", '"', "\n", "é", "气", "<", "=", "1"),
    minLength: 1,
    maxLength: 12,
  })
  // Every text begins with a letter, so that none looks like a number or a marker of a missing value.
  .map((rest) => `t${rest}`);

const files = fc.record({
  rows: fc.array(
    fc.record({ x: fc.option(number, { freq: 6 }), y: number, note: fc.option(text, { freq: 6 }) }),
    { minLength: 4, maxLength: 40 },
  ),
  end: fc.constantFrom("\n", "\r\n"),
  bom: fc.boolean(),
  delimiter: fc.constantFrom(",", ";", "\t"),
  decimal: fc.constantFrom("." as const, "," as const),
  quoteAll: fc.boolean(),
});

type File = typeof files extends fc.Arbitrary<infer F> ? F : never;

function written(file: File): string {
  const { rows, end, delimiter, decimal, quoteAll, bom } = file;
  const cell = (value: number | string | null) => {
    const said =
      value === null
        ? ""
        : typeof value === "number"
          ? (Object.is(value, -0) ? "-0" : String(value)).replace(".", decimal)
          : value;
    const special = said.includes(delimiter) || /["\n\r]/.test(said);
    return special || (quoteAll && said !== "") ? `"${said.replaceAll('"', '""')}"` : said;
  };
  const lines = [["day", "x", "y", "note"], ...rows.map(({ x, y, note }, i) => [day(i), x, y, note])];
  return (bom ? "\ufeff" : "") + lines.map((line) => line.map(cell).join(delimiter) + end).join("");
}

const day = (i: number) => new Date(Date.UTC(2024, 1, 20 + i)).toISOString().slice(0, 10);

test("what was written is read, bit for bit, and the fast reader agrees with the strict one", async () => {
  await fc.assert(
    fc.asyncProperty(files, async (file) => {
      const path = join(scratch, "a.csv");
      writeFileSync(path, written(file));
      const options = { time: "day", decimal: file.decimal, delimiter: file.delimiter };
      const table = await load(path, options);
      assert.deepEqual(
        table.periods,
        file.rows.map((_, i) => day(i)),
      );
      assert.deepEqual(
        Array.from(table.numbers("y")),
        file.rows.map(({ y }) => y),
      );
      const x = table.column("x");
      if (file.rows.some((row) => row.x !== null)) {
        assert.deepEqual(
          Array.from(x.values as Float64Array),
          file.rows.map((row) => row.x ?? Number.NaN),
        );
      }
      assert.deepEqual(
        table.column("note").values,
        file.rows.map(({ note }) => note),
      );
      const dialect = await sniffDialect(path, options);
      const kinds = kindsOf(dialect, options, missingTexts(options), path);
      const strict = await readStrictly(path, dialect, kinds, options);
      const fast = await readFast(path, dialect, kinds, options);
      assert.deepEqual(fast!.slice(1), strict.columns.slice(1));
    }),
    { seed: 3, numRuns: 60 },
  );
});

test("records do not depend on where the text is cut", () => {
  const texts = fc.string({ unit: fc.constantFrom("a", ",", '"', "\n", "\r", " "), maxLength: 40 });
  fc.assert(
    fc.property(texts, fc.array(fc.nat(40), { maxLength: 5 }), (whole, cuts) => {
      const splitter = new RecordSplitter(",");
      const pieces: unknown[] = [];
      let from = 0;
      for (const cut of [...cuts].sort((a, b) => a - b)) {
        pieces.push(...splitter.push(whole.slice(from, cut), false));
        from = Math.max(from, Math.min(cut, whole.length));
      }
      pieces.push(...splitter.push(whole.slice(from), true));
      assert.deepEqual(pieces, [...records(whole, ",")]);
    }),
    { seed: 4, numRuns: 3000 },
  );
});
