import assert from "node:assert/strict";
import { createRequire } from "node:module";
import { after, before, test } from "node:test";
import type { Kernel, KernelMessage } from "@jupyterlab/services";
import { without } from "../machine/needs.js";
import { fixturePath } from "../root.js";
import { type IsolatedLab, isolatedLab } from "./lab.js";

// The package is CommonJS.
const require = createRequire(import.meta.url);
const { KernelManager, ServerConnection } =
  require("@jupyterlab/services") as typeof import("@jupyterlab/services");

const skip = without("python");
let lab: IsolatedLab;
let manager: Kernel.IManager;
let kernel: Kernel.IKernelConnection;

before(async () => {
  if (skip) return;
  lab = await isolatedLab(fixturePath("browser/fixtures"));
  const { base, token } = lab.server;
  const serverSettings = ServerConnection.makeSettings({
    baseUrl: base,
    token,
    appendToken: true,
  });
  manager = new KernelManager({ serverSettings });
  kernel = await manager.startNew({ name: "lagbook" });
});

after(async () => {
  kernel?.dispose();
  manager?.dispose();
  await lab?.close();
});

async function execute(code: string) {
  const sent: KernelMessage.IIOPubMessage[] = [];
  const future = kernel.requestExecute({ code });
  future.onIOPub = (message) => {
    sent.push(message);
  };
  const reply = await future.done;
  const contents = (type: string) =>
    sent.filter((message) => message.header.msg_type === type).map((m) => m.content);
  return { reply: reply.content, contents };
}

test("the server lists the kernel with its logos", { skip }, async () => {
  const { base, token } = lab.server;
  const headers = { Authorization: `token ${token}` };
  const { kernelspecs } = (await (await fetch(`${base}api/kernelspecs`, { headers })).json()) as {
    kernelspecs: Record<string, { spec: { display_name: string }; resources: Record<string, string> }>;
  };
  const { spec, resources } = kernelspecs["lagbook"]!;
  assert.equal(spec.display_name, "Lagbook");
  for (const logo of ["logo-32x32", "logo-64x64", "logo-svg"]) {
    const reply = await fetch(new URL(resources[logo]!, base), { headers });
    assert.equal(reply.status, 200, logo);
  }
});

test("it says who it is", { skip }, async () => {
  const info = (await kernel.info) as KernelMessage.IInfoReply;
  assert.equal(info.status, "ok");
  assert.equal(info.language_info.name, "typescript");
});

test("a cell runs and its result and prints arrive", { skip }, async () => {
  const { reply, contents } = await execute('console.log("printed"); const a = 20; a + 1');
  assert.equal(reply.status, "ok");
  assert.deepEqual(
    contents("stream")
      .map((content) => (content as { text: string }).text)
      .join(""),
    "printed\n",
  );
  assert.equal((contents("execute_result")[0] as { data: Record<string, string> }).data["text/plain"], "21");
});

test("a card arrives as text, HTML and record together", { skip }, async () => {
  const { reply, contents } = await execute('const t = await load("small.csv", { time: "month" }); t');
  assert.equal(reply.status, "ok", JSON.stringify(reply));
  const { data } = contents("execute_result")[0] as { data: Record<string, unknown> };
  assert.deepEqual(Object.keys(data).sort(), ["application/vnd.lagbook+json", "text/html", "text/plain"]);
  assert.equal((data["application/vnd.lagbook+json"] as { kind: string }).kind, "time-table");
});

test("a value says itself how it shows", { skip }, async () => {
  const { contents } = await execute(
    '({ [Symbol.for("Jupyter.display")]: () => ({ "text/plain": "p", "text/html": "<b>h</b>" }) })',
  );
  assert.deepEqual((contents("execute_result")[0] as { data: unknown }).data, {
    "text/plain": "p",
    "text/html": "<b>h</b>",
  });
});

test("an error arrives with its name", { skip }, async () => {
  const { reply, contents } = await execute('throw new RangeError("too far")');
  assert.equal(reply.status, "error");
  const error = contents("error")[0] as { ename: string; evalue: string };
  assert.deepEqual([error.ename, error.evalue], ["RangeError", "too far"]);
});

for (const [what, code] of [
  ["an endless loop", "while (true) {}"],
  ["a promise that never settles", "await new Promise(() => {})"],
] as const) {
  test(`${what} stops at an interrupt, and the session lives on`, { skip }, async () => {
    await execute("var kept = 7");
    const running = execute(code);
    await new Promise((later) => setTimeout(later, 500));
    await kernel.interrupt();
    const { reply } = await running;
    assert.equal(reply.status, "error");
    const { contents } = await execute("kept");
    assert.equal((contents("execute_result")[0] as { data: Record<string, string> }).data["text/plain"], "7");
  });
}

test("it completes names and members", { skip }, async () => {
  await execute("const months = { january: 1, february: 2 }");
  const code = "months.jan";
  const reply = await kernel.requestComplete({ code, cursor_pos: code.length });
  assert.equal(reply.content.status, "ok");
  assert.ok((reply.content as { matches: string[] }).matches.includes("january"));
});

test("it inspects a cell function", { skip }, async () => {
  const reply = await kernel.requestInspect({ code: "dependence", cursor_pos: 4, detail_level: 0 });
  const content = reply.content as { found: boolean; data: Record<string, string> };
  assert.equal(content.found, true);
  assert.match(content.data["text/plain"]!, /dependence/);
});

test("it shuts down when it is told to", { skip }, async () => {
  await kernel.shutdown();
  const left = await (
    await fetch(`${lab.server.base}api/kernels`, {
      headers: { Authorization: `token ${lab.server.token}` },
    })
  ).json();
  assert.deepEqual(left, []);
});
