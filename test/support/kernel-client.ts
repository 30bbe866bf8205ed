import { type ChildProcess, spawn } from "node:child_process";
import { createHmac, randomUUID } from "node:crypto";
import { mkdtempSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Dealer, Request, Subscriber } from "zeromq";
import { root } from "../root.js";

/** A message as the tests see it. */
export interface Seen {
  readonly type: string;
  readonly parent: string | undefined;
  readonly content: Record<string, any>;
  readonly metadata: Record<string, any>;
}

async function freePorts(count: number): Promise<number[]> {
  const servers = await Promise.all(
    Array.from({ length: count }, async () => {
      const server = createServer();
      await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
      return server;
    }),
  );
  const ports = servers.map((server) => (server.address() as { port: number }).port);
  await Promise.all(servers.map((server) => new Promise((resolve) => server.close(resolve))));
  return ports;
}

/** A kernel process of its own and a client that speaks the protocol frame by frame, so that it can also misbehave. */
export class KernelClient {
  readonly process: ChildProcess;
  /** Everything published so far. */
  readonly published: Seen[] = [];
  readonly #key = "the key of the tests";
  readonly #session = randomUUID();
  readonly #shell = new Dealer({ linger: 0 });
  readonly #control = new Dealer({ linger: 0 });
  readonly #stdin = new Dealer({ linger: 0 });
  readonly #iopub = new Subscriber({ linger: 0 });
  readonly #heartbeat = new Request({ linger: 0, receiveTimeout: 5000 });
  readonly #replies: Seen[] = [];
  readonly #waiters = new Set<() => void>();
  errors = "";
  /** What is answered to a question of `ask`. */
  answer: ((prompt: string, password: boolean) => string) | undefined;

  static async start(directory = root): Promise<KernelClient> {
    const ports = await freePorts(5);
    return new KernelClient(ports, directory);
  }

  private constructor(ports: number[], directory: string) {
    const file = join(mkdtempSync(join(tmpdir(), "lagbook-")), "connection.json");
    const [shell_port, iopub_port, stdin_port, control_port, hb_port] = ports;
    const connection = {
      transport: "tcp",
      ip: "127.0.0.1",
      shell_port,
      iopub_port,
      stdin_port,
      control_port,
      hb_port,
    };
    writeFileSync(file, JSON.stringify({ ...connection, key: this.#key, signature_scheme: "hmac-sha256" }));
    this.process = spawn(process.execPath, [join(root, "dist/kernel/cli.js"), "kernel", file], {
      cwd: directory,
      stdio: ["ignore", "ignore", "pipe"],
    });
    this.process.stderr!.on("data", (text) => (this.errors += text));
    const at = (port: number) => `tcp://127.0.0.1:${port}`;
    const identity = randomUUID();
    for (const socket of [this.#shell, this.#stdin]) socket.routingId = identity;
    this.#shell.connect(at(shell_port!));
    this.#control.connect(at(control_port!));
    this.#stdin.connect(at(stdin_port!));
    this.#heartbeat.connect(at(hb_port!));
    this.#iopub.connect(at(iopub_port!));
    this.#iopub.subscribe();
    void this.#listen(this.#shell, (seen) => this.#replies.push(seen));
    void this.#listen(this.#control, (seen) => this.#replies.push(seen));
    void this.#listen(this.#iopub, (seen) => this.published.push(seen));
    void this.#listen(this.#stdin, (seen, header) => {
      const value = this.answer?.(seen.content["prompt"], seen.content["password"]);
      if (value !== undefined) void this.#stdin.send(this.frames("input_reply", { value }, header).frames);
    });
  }

  async #listen(socket: AsyncIterable<Buffer[]>, take: (seen: Seen, header: object) => void): Promise<void> {
    try {
      for await (const frames of socket) {
        const at = frames.findIndex((frame) => frame.toString() === "<IDS|MSG>");
        const [header, parent, metadata, content] = frames
          .slice(at + 2, at + 6)
          .map((part) => JSON.parse(part.toString()));
        take({ type: header.msg_type, parent: parent.msg_id, content, metadata }, header);
        for (const wake of this.#waiters) wake();
      }
    } catch {} // closed
  }

  /** The frames of a message, signed. */
  frames(
    type: string,
    content: object,
    parent: object = {},
    key = this.#key,
  ): { id: string; frames: (string | Buffer)[] } {
    const id = randomUUID();
    const date = new Date().toISOString();
    const header = {
      msg_id: id,
      session: this.#session,
      username: "test",
      date,
      msg_type: type,
      version: "5.4",
    };
    const parts = [header, parent, {}, content].map((part) => Buffer.from(JSON.stringify(part)));
    const digest = createHmac("sha256", key);
    for (const part of parts) digest.update(part);
    return { id, frames: ["<IDS|MSG>", digest.digest("hex"), ...parts] };
  }

  async sendRaw(channel: "shell" | "control", frames: (string | Buffer)[]): Promise<void> {
    await (channel === "shell" ? this.#shell : this.#control).send(frames);
  }

  /** Sends a request; returns its id. */
  async send(type: string, content: object, channel: "shell" | "control" = "shell"): Promise<string> {
    const { id, frames } = this.frames(type, content);
    await this.sendRaw(channel, frames);
    return id;
  }

  /** Waits until `find` finds something. */
  async until<R>(find: () => R | undefined, milliseconds = 60_000): Promise<R> {
    const limit = Date.now() + milliseconds;
    for (;;) {
      const found = find();
      if (found !== undefined) return found;
      const left = limit - Date.now();
      if (left <= 0)
        throw new Error(
          `nothing came in ${milliseconds} ms; published: ${JSON.stringify(this.published.slice(-8))}; ${this.errors}`,
        );
      await new Promise<void>((resolve) => {
        const timer = setTimeout(done, left);
        const waiters = this.#waiters;
        function done() {
          clearTimeout(timer);
          waiters.delete(done);
          resolve();
        }
        waiters.add(done);
      });
    }
  }

  reply(id: string, milliseconds?: number): Promise<Seen> {
    return this.until(() => this.#replies.find(({ parent }) => parent === id), milliseconds);
  }

  async request(type: string, content: object, channel: "shell" | "control" = "shell"): Promise<Seen> {
    return this.reply(await this.send(type, content, channel));
  }

  /** What was published on behalf of a request, once the kernel is idle again after it. */
  async outputs(id: string): Promise<Seen[]> {
    await this.until(() =>
      this.published.find((seen) => seen.parent === id && seen.content["execution_state"] === "idle"),
    );
    return this.published.filter((seen) => seen.parent === id && seen.type !== "status");
  }

  /** Runs a cell: its reply and what it published. */
  async run(code: string, options: object = {}): Promise<{ reply: Record<string, any>; outputs: Seen[] }> {
    const id = await this.send("execute_request", { code, ...defaults, ...options });
    const reply = await this.reply(id);
    return { reply: reply.content, outputs: await this.outputs(id) };
  }

  /** Milliseconds that a heartbeat takes to come back. */
  async beat(): Promise<number> {
    const start = performance.now();
    await this.#heartbeat.send("ping");
    await this.#heartbeat.receive();
    return performance.now() - start;
  }

  async close(): Promise<number | null> {
    const gone = new Promise<number | null>((resolve) => this.process.once("exit", resolve));
    if (this.process.exitCode !== null) return this.process.exitCode;
    await this.send("shutdown_request", { restart: false }, "control");
    const code = await gone;
    for (const socket of [this.#shell, this.#control, this.#stdin, this.#iopub, this.#heartbeat])
      socket.close();
    return code;
  }
}

const defaults = {
  silent: false,
  store_history: true,
  user_expressions: {},
  allow_stdin: true,
  stop_on_error: true,
};
