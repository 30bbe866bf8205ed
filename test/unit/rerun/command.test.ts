import assert from "node:assert/strict";
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { after, test } from "node:test";
import { run } from "../../../kernel/install/command.js";
import { fixturePath, root } from "../../root.js";

// These run the built command in a process of its own, with a real session.
const cli = join(root, "dist", "kernel", "cli.js");
const folder = mkdtempSync(join(tmpdir(), "lagbook-"));
after(() => rmSync(folder, { recursive: true }));
const lagbook = (...args: string[]) => run(process.execPath, [cli, ...args], { cwd: folder });

function book(name: string, ...sources: string[]): string {
  const cells = sources.map((source, at) => ({
    cell_type: "code",
    id: `c${at}`,
    metadata: {},
    source: [source],
    execution_count: null,
    outputs: [],
  }));
  writeFileSync(join(folder, name), JSON.stringify({ nbformat: 4, nbformat_minor: 5, metadata: {}, cells }));
  return name;
}
const outputs = (name: string) =>
  (
    JSON.parse(readFileSync(join(folder, name), "utf8")).cells as { outputs: Record<string, unknown>[] }[]
  ).map((cell) => cell.outputs);

test("help names every command and its options; the version is the package's", async () => {
  const help = await lagbook("--help");
  assert.equal(help.code, 0);
  for (const name of ["start", "run", "install", "kernel", "--version"])
    assert.ok(help.text.includes(name), name);
  const runHelp = (await lagbook("run", "--help")).text;
  for (const name of ["--html", "--output", "--timeout", "Exit code"])
    assert.ok(runHelp.includes(name), name);
  const installHelp = (await lagbook("install", "--help")).text;
  for (const name of ["--user", "--prefix"]) assert.ok(installHelp.includes(name), name);
  const { version } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
  assert.equal((await lagbook("--version")).text.trim(), version);
});

test("a wrong word is refused with the nearest right one", async () => {
  const wrong = await lagbook("instal");
  assert.notEqual(wrong.code, 0);
  assert.match(wrong.text, /install/);
  assert.match((await lagbook("run", "x.ipynb", "--timeout", "soon")).text, /number of seconds/);
  assert.notEqual((await lagbook("install", "--user", "--prefix", "p")).code, 0);
});

test("install writes a specification under a prefix", async () => {
  const end = await lagbook("install", "--prefix", "env");
  assert.equal(end.code, 0, end.text);
  assert.ok(existsSync(join(folder, "env", "share", "jupyter", "kernels", "lagbook", "kernel.json")));
  assert.match(end.text, /share\/jupyter\/kernels\/lagbook/);
});

test("a notebook runs to its end, in its own folder, and both files are written", async () => {
  writeFileSync(join(folder, "beside.txt"), "beside");
  const name = book(
    "good.ipynb",
    'import { readFileSync } from "node:fs";\nreadFileSync("beside.txt", "utf8")',
    'console.log("a"); console.log("b")',
    "await Promise.resolve(6 * 7)",
  );
  const end = await lagbook("run", name, "--html", "out/good.html", "--output", "out/done.ipynb");
  assert.equal(end.code, 0, end.text);
  assert.match(end.text, /good\.ipynb: 3 code cells ran/);
  const [first, second, third] = outputs("out/done.ipynb");
  assert.deepEqual((first![0]!["data"] as Record<string, unknown>)["text/plain"], ["'beside'"]);
  assert.deepEqual(second, [{ name: "stdout", output_type: "stream", text: ["a\n", "b\n"] }]);
  assert.deepEqual((third![0]!["data"] as Record<string, unknown>)["text/plain"], ["42"]);
  assert.match(readFileSync(join(folder, "out", "good.html"), "utf8"), /<pre>42<\/pre>/);
});

test("a run is repeatable to the byte", async () => {
  for (const out of ["once.ipynb", "twice.ipynb"]) {
    const end = await lagbook("run", fixturePath("browser/fixtures/small.ipynb"), "--output", out);
    assert.equal(end.code, 0, end.text);
  }
  assert.equal(
    readFileSync(join(folder, "once.ipynb"), "utf8"),
    readFileSync(join(folder, "twice.ipynb"), "utf8"),
  );
});

test("a failing cell: exit code 1, its number and message, and what came so far is written", async () => {
  const name = book("bad.ipynb", "const a = 1", 'throw new RangeError("too far")', "a");
  const end = await lagbook("run", name, "--html", "bad.html", "--output", "bad-done.ipynb");
  assert.equal(end.code, 1);
  assert.match(end.text, /cell 2 \[2\] failed \(1 after it not run\): RangeError: too far/);
  const [, second, third] = outputs("bad-done.ipynb");
  assert.equal(second![0]!["ename"], "RangeError");
  assert.deepEqual(third, []);
  assert.match(readFileSync(join(folder, "bad.html"), "utf8"), /stopped at cell 2/);
});

for (const [what, source] of [
  ["a busy loop", "while (true) {}"],
  ["an endless wait", "await new Promise(() => {})"],
  ["a busy loop after a wait", "await 1; while (true) {}"],
] as const) {
  test(`a time limit stops ${what}`, async () => {
    const end = await lagbook(
      "run",
      book("slow.ipynb", "1", source, "2"),
      "--timeout",
      "1",
      "--output",
      "slow-done.ipynb",
    );
    assert.equal(end.code, 1, end.text);
    assert.match(end.text, /cell 2 \[2\] failed \(1 after it not run\): it ran longer than 1 s/);
    assert.equal(outputs("slow-done.ipynb")[0]!.length, 1);
  });
}

test("several notebooks go into folders, and one that is none does not stop the others", async () => {
  writeFileSync(join(folder, "none.ipynb"), "{");
  const end = await lagbook("run", "none.ipynb", "absent.ipynb", book("one.ipynb", "1"), "--html", "pages");
  assert.equal(end.code, 2);
  assert.match(end.text, /none\.ipynb is not a notebook/);
  assert.match(end.text, /no file absent\.ipynb/);
  assert.match(end.text, /one\.ipynb: 1 code cell ran/);
  assert.ok(existsSync(join(folder, "pages", "one.html")));
});
