/*
 * npm test: sets up what the tests need, then runs every test file through Node's test runner.
 *
 *   npm test                        all of them
 *   npm test -- unit/rerun browser  those whose path under test/ begins so
 *
 * Under CI=true nothing may be skipped. On a developer's machine the tests of a missing thing are skipped, loudly.
 */
import { spawn } from "node:child_process";
import { existsSync, mkdirSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { ensureEnvironment, places, SetUpError } from "../kernel/install/index.js";
import { aptInstall, findChromium } from "./machine/chromium.js";
import { strict } from "./machine/needs.js";
import { readSummary } from "./machine/summary.js";
import { root } from "./root.js";

const say = (line: string) => console.log(line);

function testFiles(wanted: readonly string[]): string[] {
  return readdirSync(join(root, "test"), { recursive: true, encoding: "utf8" })
    .map((path) => path.replaceAll("\\", "/"))
    .filter((path) => path.endsWith(".test.ts"))
    .filter(
      (path) => wanted.length === 0 || wanted.some((start) => path.startsWith(start.replace(/^test\//, ""))),
    )
    .sort()
    .map((path) => join(root, "dist", "test", path.replace(/\.ts$/, ".js")));
}

/** Provides the Python environment and Chromium. @returns what could not be had, one line each */
async function setUp(): Promise<string[]> {
  const missing: string[] = [];
  const environment = () => ensureEnvironment(places(), "tests", say);
  try {
    await environment().catch(async (problem) => {
      const debian = ["python3", "python3-venv", "python3-pip"];
      if (!(problem instanceof SetUpError) || !(await aptInstall(debian, say))) throw problem;
      return environment();
    });
  } catch (problem) {
    if (!(problem instanceof SetUpError)) throw problem;
    missing.push(`Python environment: ${problem.message}${problem.details ? `\n${problem.details}` : ""}`);
  }
  if (!findChromium() && !process.env["LAGBOOK_CHROMIUM"])
    await aptInstall(["chromium", "fonts-liberation"], say);
  if (!findChromium()) missing.push("Chromium: install it, or name one in LAGBOOK_CHROMIUM");
  return missing;
}

function runFiles(files: readonly string[], report: string): Promise<number> {
  const child = spawn(
    process.execPath,
    [
      ...["--enable-source-maps", "--test", "--test-concurrency=2"],
      ...["--test-reporter=spec", "--test-reporter-destination=stdout"],
      ...["--test-reporter=tap", `--test-reporter-destination=${report}`],
      ...files,
    ],
    { cwd: root, stdio: ["ignore", "inherit", "inherit"] },
  );
  return new Promise((settle) => child.on("close", (code) => settle(code ?? 1)));
}

const missing = await setUp();
if (missing.length > 0) {
  const bar = "!".repeat(100);
  say(
    `${bar}\nThe tests that need these ${strict ? "cannot run" : "are SKIPPED"}:\n${missing.join("\n")}\n${bar}`,
  );
  if (strict) process.exit(1);
}
const files = testFiles(process.argv.slice(2));
const unbuilt = files.filter((file) => !existsSync(file));
if (files.length === 0 || unbuilt.length > 0) {
  say(files.length === 0 ? "No test file there." : `Not built: ${unbuilt.join(", ")}`);
  process.exit(1);
}
const state = join(places().state, "test");
mkdirSync(state, { recursive: true });
const report = join(state, "results.tap");
let code = await runFiles(files, report);
const { tests, pass, fail, cancelled, skipped, todo, left } = readSummary(readFileSync(report, "utf8"));
for (const line of left) say(line);
if (tests === 0 || (strict && skipped + todo > 0)) {
  say(tests === 0 ? "No test ran." : "Under CI no test may be skipped.");
  code ||= 1;
}
say(`${pass} passed, ${fail + cancelled} failed, ${skipped + todo} skipped`);
process.exitCode = code;
