import assert from "node:assert/strict";
import { test } from "node:test";
import { InputError } from "../../../../../src/numeric/index.js";
import { days, loaded, said } from "../scratch.js";

const ten = Array.from({ length: 10 }, (_, i) => i);

async function refuses(content: string | Uint8Array, pattern: RegExp, options = {}): Promise<void> {
  await assert.rejects(loaded(content, options), (error: Error) => {
    assert.ok(error instanceof InputError, error.stack);
    assert.match(error.message, pattern);
    return true;
  });
}

test("line ends of every kind, also mixed", async () => {
  const plain = days(String);
  for (const text of [
    plain.replaceAll("\n", "\r\n"),
    plain.replaceAll("\n", "\r"),
    plain.replace("\n", "\r\n").replace(/\n(?=2020-01-05)/, "\r\n"),
    plain.trimEnd(),
  ]) {
    assert.deepEqual(Array.from((await loaded(text)).numbers("a")), ten);
  }
});

test("a faulty record is named with its row and line", async () => {
  await refuses(
    days((i) => (i === 3 ? '"4' : `${i}`)),
    /row 4 \(line 5\).*quote that opens on line 5 is never closed/,
  );
  await refuses(
    days((i) => (i === 3 ? '"4"x' : `${i}`)),
    /row 4 \(line 5\).*text follows a closing quote/,
  );
  await refuses(
    days((i) => (i === 2 ? "4,5" : `${i}`)),
    /row 3 \(line 4\).*it has 3 fields.*names 2 columns/,
  );
  await refuses(days(String).replace("2020-01-04,3", "2020-01-04"), /row 4 \(line 5\).*it has 1 field,/);
  await refuses(
    days((i) => (i === 3 ? "\0" : `${i}`)),
    /zero byte in line 5/,
  );
});

test("rows and lines are counted past quoted newlines and blank lines", async () => {
  const text =
    't,a,n\n2020-01-01,1,"one\ntwo"\n\n2020-01-02,2,x\n2020-01-03,oops,y\n2020-01-04,4,z\n2020-01-05,5,z\n';
  await refuses(text, /row 3 \(line 6\).*column "a": "oops" is not a number/);
  await refuses(
    text.replace("oops", "3").replace("2020-01-03", "2020-02-31"),
    /row 3 \(line 6\).*"2020-02-31": there is no such date/,
  );
});

test("what looks like a number to some readers is none", async () => {
  for (const cell of ["1_000", "0x1F", "1e", "--5", "１２", "1 2", "1e5f", "$5", "5%"]) {
    await refuses(
      days((i) => (i === 3 ? cell : `${i}`)),
      /row 4 \(line 5\).*is not a number.*missing: \[.*text: \["a"\]/,
    );
  }
  for (const cell of ["inf", "-Infinity", "INF"])
    await refuses(
      days((i) => (i === 3 ? cell : `${i}`)),
      /is infinite/,
    );
  await refuses(
    days((i) => (i === 3 ? "1e999" : `${i}`)),
    /too large for a double/,
  );
  const odd = await loaded(
    days((i) => ["+1", ".5", "5.", " 7 ", "1E3", "-0", "1e-400", '"9"', "08", "4"][i]!),
  );
  assert.deepEqual(Array.from(odd.numbers("a")), [1, 0.5, 5, 7, 1000, -0, 0, 9, 8, 4]);
});

test("markers of missing values are counted; others are errors until they are named", async () => {
  const table = await loaded(days((i) => ["", "NA", "NaN", "null", " NA ", "na", "5", "6", "7", "8"][i]!));
  assert.equal(
    said(table)[0],
    'read as missing: 1 blank and 2 "NA" and 1 "NaN" and 1 "null" and 1 "na" in "a"',
  );
  await refuses(
    days((i) => (i < 6 ? "." : `${i}`)),
    /row 1 \(line 2\).*"\." is not a number/,
  );
  await refuses(
    days((i) => (i === 2 ? "-" : `${i}`)),
    /"-" is not a number/,
  );
  const named = await loaded(
    days((i) => (i < 6 ? "." : i === 7 ? "-999" : `${i}`)),
    { missing: [".", "-999"] },
  );
  assert.equal(said(named)[0], 'read as missing: 6 "." and 1 "-999" in "a"');
  await refuses(
    days((i) => (i === 2 ? "" : `${i}`)),
    /"" is not a number/,
    { missing: ["NA"] },
  );
});

test("styles of numbers are found out and said, or asked for", async () => {
  const first = async (text: string, options = {}) => {
    const table = await loaded(text, options);
    return [table.numbers("a")[0], ...said(table)];
  };
  assert.deepEqual(await first(days((i) => `1'23${i}.5`)), [1230.5, `numbers have "'" between thousands`]);
  assert.deepEqual((await first(days((i) => `1\u202f23${i},5`, ";"))).slice(0, 3), [
    1230.5,
    "columns are separated by semicolons",
    "numbers have a decimal comma",
  ]);
  assert.equal((await first(days((i) => `1.23${i},5`, ";")))[0], 1230.5);
  assert.equal((await first(days((i) => `1,23${i}.5`, "|")))[0], 1230.5);
  assert.equal((await first(days((i) => `0,${i}5`, "\t")))[0], 0.05);
  // 1,230 may be either; so may every other cell.
  await refuses(
    days((i) => `1,23${i}`, ";"),
    /in "1,230" the comma may stand before decimals or between thousands/,
  );
  assert.equal(
    (
      await first(
        days((i) => `1,23${i}`, ";"),
        { thousands: "," },
      )
    )[0],
    1230,
  );
  assert.equal(
    (
      await first(
        days((i) => `1,23${i}`, ";"),
        { decimal: "," },
      )
    )[0],
    1.23,
  );
  await refuses(
    days((i) => `1,23${i}`, ";"),
    /decimal and thousands are both/,
    { decimal: ",", thousands: "," },
  );
});

test("encodings", async () => {
  const text = days((i) => `${i}`).replace("t,a", "t,ä€");
  const utf16 = (order: "le" | "be") => {
    const bytes = Buffer.from(`\ufeff${text}`, "utf16le");
    return order === "le" ? bytes : bytes.swap16();
  };
  for (const bytes of [utf16("le"), utf16("be")]) {
    const table = await loaded(bytes);
    assert.deepEqual(Array.from(table.numbers("ä€")), ten);
    assert.deepEqual(said(table), ["the file is encoded in UTF-16"]);
  }
  const windows = Buffer.from(text.replace("ä€", "\xe4\x80"), "latin1");
  assert.deepEqual((await loaded(windows)).names, ["ä€"]);
});

test("bytes that are no UTF-8 far into a file are seen", async () => {
  const lines = Array.from({ length: 30_000 }, (_, i) => `${i},${i / 7},name`).join("\n");
  const bytes = Buffer.concat([
    Buffer.from(`t,a,n\n${lines}\n`),
    Buffer.from("30000,1,\xe9t\xe9\n", "latin1"),
  ]);
  const table = await loaded(bytes);
  assert.equal(table.column("n").values[30_000], "été");
  assert.match(said(table).join(), /not UTF-8/);
});

test("the delimiter that parts all lines alike wins over one that stands more often in the header", async () => {
  const text = days((i) => `${i};u,v,w`, ";").replace("t;a", "t;a;n (x, y, z)");
  assert.deepEqual((await loaded(text)).names, ["a", "n (x, y, z)"]);
  await refuses(days(String, " "), /has one column, called "t a".*delimiter: " "/);
  assert.deepEqual((await loaded(days(String, " "), { delimiter: " " })).names, ["a"]);
});

test("lines before the header, ends of line with a delimiter, no header", async () => {
  assert.deepEqual(
    Array.from((await loaded(`# made\n# by, hand\n${days(String)}`, { skip: 2 })).numbers("a")),
    ten,
  );
  await refuses(`# made\n# by, hand\n${days((i) => (i === 3 ? "x" : `${i}`))}`, /row 4 \(line 7\)/, {
    skip: 2,
  });
  assert.deepEqual((await loaded(days((i) => `${i},`).replace("t,a", "t,a,"))).names, ["a"]);
  assert.deepEqual((await loaded(days((i) => `${i},`))).names, ["a"]);
  const headless = days(String).split("\n").slice(1).join("\n");
  assert.equal((await loaded(headless, { names: ["t", "a"] })).T, 10);
  await refuses(days((i) => `${i},2`).replace("t,a", "t,a,"), /column 3 of .* has no name/);
});

test("columns of text, truth values, mixtures", async () => {
  const truth = await loaded(days((i) => (i % 2 ? "TRUE" : "false")));
  assert.deepEqual(
    [truth.column("a").kind, ...Array.from(truth.numbers("a").slice(0, 2))],
    ["boolean", 0, 1],
  );
  const mixed = await loaded(days((i) => (i < 6 ? `abc${i}` : `${i}`)));
  assert.match(said(mixed)[0]!, /"a" is text; 4 of its 10 values are written like numbers \("6"\)/);
  const percent = await loaded(days((i) => `${i}%`));
  assert.match(said(percent)[0]!, /every value is written like a number \("0%"\); make it one with .define/);
  const kept = await loaded(days(String), { text: ["a"] });
  assert.deepEqual([kept.column("a").kind, said(kept)], ["text", []]);
  const formula = await loaded(days((i) => `=1+${i}`));
  assert.equal(formula.column("a").values[3], "=1+3");
});

test("a column that is blank in the first thousand rows is what its values are", async () => {
  const late = (cell: string) => days((i) => (i < 1200 ? "" : cell), ",", 1300);
  const numbers = await loaded(late("1.5"));
  assert.equal(numbers.column("a").kind, "number");
  assert.equal(numbers.numbers("a")[1250], 1.5);
  assert.match(said(numbers).join(), /"a" begins only in 2023-04-15/);
  assert.equal((await loaded(late("x"))).column("a").kind, "text");
  assert.equal((await loaded(days(() => ""))).column("a").kind, "text");
});

test("a field of ten million characters", async () => {
  const table = await loaded(days((i) => (i === 3 ? "x".repeat(1e7) : "y")));
  assert.equal((table.column("a").values[3] as string).length, 1e7);
});

test("an error far down a long file is found, with its line", async () => {
  const count = 120_000;
  const lines = Array.from({ length: count }, (_, i) => `${i},${i / 3},${i * 1e-7}`);
  lines[count - 5] = `${count - 5},${count},1_0`;
  await refuses(
    `t,a,b\n${lines.join("\n")}\n`,
    /row 119996 \(line 119997\).*column "b": "1_0" is not a number/,
  );
  lines[count - 5] = `${count - 5},"${count}`;
  await refuses(`t,a,b\n${lines.join("\n")}\n`, /row 119996 \(line 119997\).*never closed/);
  lines[count - 5] = `${count - 4},1,2`;
  await refuses(`t,a,b\n${lines.join("\n")}\n`, /rows 119996 and 119997 both stand for 119996; they differ/);
});

test("long files say markers and blank lines as short ones do", async () => {
  const count = 150_000;
  const lines = Array.from(
    { length: count },
    (_, i) => `${i},${i % 50_000 === 7 ? "NA" : i / 3},${i * 1e-7}`,
  );
  lines.splice(70_000, 0, "", "");
  const table = await loaded(`t,a,b\n${lines.join("\n")}\n\n`);
  assert.deepEqual(said(table).slice(0, 2), [
    "2 blank lines were passed over, first line 70002",
    'read as missing: 3 "NA" in "a"',
  ]);
  assert.equal(table.numbers("a")[149_999], 149_999 / 3);
});

test("what is no text is named for what it is", async () => {
  await refuses(Buffer.from("1f8b0800", "hex"), /is packed with gzip; unpack it first/);
  await refuses("PAR1....", /is a Parquet file; end its name in \.parquet/);
  await refuses("PK\u0003\u0004", /a zip archive or a workbook/);
});
