import assert from "node:assert/strict";
import { spawn } from "node:child_process";
import {
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
} from "node:fs";
import { createServer } from "node:net";
import { join } from "node:path";
import { after, before, test } from "node:test";
import { run } from "../../kernel/install/command.js";
import { places } from "../../kernel/install/index.js";
import { without } from "../machine/needs.js";
import { root } from "../root.js";
import { demoNotebooks } from "./lab.js";

// A checkout as it stands after the build, with a home folder beside it that must stay empty.
let scratch: string;
let checkout: string;
let home: string;
let environment: NodeJS.ProcessEnv;

before(() => {
  const parent = join(places().state, "test");
  mkdirSync(parent, { recursive: true });
  scratch = mkdtempSync(join(parent, "start-"));
  checkout = join(scratch, "checkout");
  home = join(scratch, "home");
  mkdirSync(home);
  mkdirSync(checkout);
  for (const path of ["package.json", "dist", "kernel", "src", "notebooks-demo"]) {
    if (existsSync(join(root, path))) cpSync(join(root, path), join(checkout, path), { recursive: true });
  }
  symlinkSync(join(root, "node_modules"), join(checkout, "node_modules"));
  environment = { ...process.env, HOME: home, CI: "true", DISPLAY: "" };
  for (const name of ["XDG_DATA_HOME", "XDG_CONFIG_HOME", "XDG_CACHE_HOME"]) delete environment[name];
});

after(() => rmSync(scratch, { recursive: true, force: true }));

const cli = () => join(checkout, "dist", "kernel", "cli.js");

test("with no Python, start runs the notebooks itself, writes them and their pages, and says what is missing", async () => {
  const env = { ...environment, LAGBOOK_PYTHON: join(scratch, "no-python") };
  const end = await run(process.execPath, [cli(), "start"], { cwd: checkout, env });
  assert.equal(end.code, 0, end.text);
  assert.match(end.text, /Missing: Python 3\.11 or later/);
  const pages = join(checkout, ".lagbook", "pages");
  for (const name of demoNotebooks()) {
    assert.ok(end.text.includes(join(pages, name)), `${name} is named`);
    const { cells } = JSON.parse(readFileSync(join(pages, name), "utf8"));
    assert.ok(cells.some((cell: { outputs?: unknown[] }) => (cell.outputs ?? []).length > 0));
    assert.match(readFileSync(join(pages, name.replace(/ipynb$/, "html")), "utf8"), /<\/html>/);
  }
  assert.deepEqual(readdirSync(home), [], "the home folder is untouched");
});

test("with Python, start opens JupyterLab on the notebooks, and stops when told to", {
  skip: without("python"),
}, async () => {
  symlinkSync(places().environment, join(checkout, ".venv"));
  const port = await freePort();
  const child = spawn(process.execPath, [cli(), "start", "--port", String(port)], {
    cwd: checkout,
    env: environment,
  });
  let text = "";
  child.stdout.setEncoding("utf8").on("data", (piece: string) => {
    text += piece;
  });
  child.stderr.setEncoding("utf8").on("data", (piece: string) => {
    text += piece;
  });
  const ended = new Promise<number | null>((settle) => child.on("close", settle));
  try {
    const address = await new Promise<string>((settle, fail) => {
      const look = setInterval(() => {
        const found = /(http:\S+)\?token=(\w+)/.exec(text);
        if (found) settle(found[0]);
        if (found || child.exitCode !== null) clearInterval(look);
        if (!found && child.exitCode !== null) fail(new Error(text));
      }, 100);
    });
    assert.equal(new URL(address).port, String(port));
    const token = new URL(address).searchParams.get("token")!;
    const headers = { Authorization: `token ${token}` };
    const get = async (path: string) => (await fetch(`http://localhost:${port}/${path}`, { headers })).json();
    const { content } = (await get("api/contents")) as { content: { name: string }[] };
    for (const name of demoNotebooks()) assert.ok(content.some((entry) => entry.name === name));
    const specs = (await get("api/kernelspecs")) as {
      default: string;
      kernelspecs: Record<string, { spec: { argv: string[] } }>;
    };
    assert.equal(specs.default, "lagbook");
    assert.equal(specs.kernelspecs["lagbook"]!.spec.argv[1], cli());
    assert.equal((await fetch(address)).status, 200);
  } finally {
    child.kill("SIGTERM");
  }
  assert.equal(await ended, 0, text);
  assert.match(text, /JupyterLab has stopped/);
  assert.deepEqual(readdirSync(home), [], "the home folder is untouched");
});

function freePort(): Promise<number> {
  return new Promise((settle) => {
    const server = createServer().listen(0, "127.0.0.1", () => {
      const { port } = server.address() as { port: number };
      server.close(() => settle(port));
    });
  });
}
