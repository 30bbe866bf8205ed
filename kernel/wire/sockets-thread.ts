import { randomUUID } from "node:crypto";
import { writeSync } from "node:fs";
import { type MessagePort, workerData } from "node:worker_threads";
import { Publisher, Reply, Router } from "zeromq";
import { giveAnswer } from "./answer.js";
import type { Asker, ToSession, ToSockets } from "./between.js";
import { address, type Connection } from "./connection.js";
import { interruptLadder } from "./interrupt-ladder.js";
import { kernelInfo } from "./kernel-info.js";
import { type Header, type Message, makeMessage } from "./message.js";
import { GatheringPublisher } from "./publisher.js";
import { SharedState } from "./shared.js";
import { decode, encode } from "./signing.js";

/*
 * The thread that owns every socket. It answers the heartbeat, the control channel and questions about the kernel
 * while the other thread computes, and passes everything else on.
 */
const { connection, port, memory } = workerData as {
  connection: Connection;
  port: MessagePort;
  memory: SharedArrayBuffer;
};
const shared = new SharedState(memory);
const session = randomUUID();
// No high-water marks: past one, messages would be dropped unsaid. Cells that print are held back instead.
const options = { linger: 500, sendHighWaterMark: 0, receiveHighWaterMark: 0 };
const shell = new Router(options);
const control = new Router(options);
const stdin = new Router(options);
const heartbeat = new Reply({ linger: 0 });
const iopub = new Publisher({ linger: 500, sendHighWaterMark: 0 });

/** ZeroMQ sockets take one send at a time. */
function inOrder(socket: {
  send(frames: Uint8Array[]): Promise<void>;
}): (frames: Uint8Array[]) => Promise<void> {
  let last: Promise<void> = Promise.resolve();
  return (frames) => {
    last = last.then(() => socket.send(frames)).catch((error) => log(`sending failed: ${error}`));
    return last;
  };
}

const sendShell = inOrder(shell);
const sendControl = inOrder(control);
const sendStdin = inOrder(stdin);
const sendIopub = inOrder(iopub);
const publisher = new GatheringPublisher(
  (message, topic) => sendIopub(encode({ identities: [Buffer.from(topic)], message }, connection.key)),
  session,
  (length) => shared.sent(length),
);

let running: number | undefined;
let asked: { readonly id: string; readonly reply: SharedArrayBuffer } | undefined;
let closing = false;

function log(text: string): void {
  // Not by this thread's own stream, which waits for the other thread to have a moment.
  try {
    writeSync(2, `lagbook kernel: ${text}\n`);
  } catch {} // nobody listens any more
}

function tell(message: ToSession): void {
  port.postMessage(message);
}

function reply(
  send: typeof sendShell,
  asker: Asker,
  kind: string,
  content: Record<string, unknown>,
  metadata?: Record<string, unknown>,
): Promise<void> {
  const message = makeMessage(kind, content, asker.header, session, metadata);
  return send(encode({ identities: asker.identities, message }, connection.key));
}

function status(state: "starting" | "busy" | "idle", parent: Header | Record<string, never>): void {
  publisher.publish("status", { execution_state: state }, parent);
}

/** Answers what this thread can answer itself; false when it is for the session. */
function answerHere(send: typeof sendShell, asker: Asker, message: Message): boolean {
  if (message.header.msg_type !== "kernel_info_request") return false;
  status("busy", asker.header);
  void reply(send, asker, "kernel_info_reply", kernelInfo());
  status("idle", asker.header);
  return true;
}

async function serveShell(): Promise<void> {
  for await (const frames of shell) {
    const read = decode(frames, connection.key);
    if ("refused" in read) log(`message on shell dropped: ${read.refused}`);
    else if (
      !answerHere(sendShell, { identities: read.identities, header: read.message.header }, read.message)
    ) {
      tell({ type: "request", identities: read.identities, message: read.message });
    }
  }
}

async function serveControl(): Promise<void> {
  for await (const frames of control) {
    const read = decode(frames, connection.key);
    if ("refused" in read) {
      log(`message on control dropped: ${read.refused}`);
      continue;
    }
    const asker = { identities: read.identities, header: read.message.header };
    if (answerHere(sendControl, asker, read.message)) continue;
    const kind = read.message.header.msg_type;
    status("busy", asker.header);
    if (kind === "interrupt_request") {
      interrupt();
      void reply(sendControl, asker, "interrupt_reply", { status: "ok" });
    } else if (kind === "shutdown_request") {
      const restart = read.message.content["restart"] === true;
      void reply(sendControl, asker, "shutdown_reply", { status: "ok", restart });
      publisher.publish("shutdown_reply", { status: "ok", restart }, asker.header);
      status("idle", asker.header);
      void close();
      continue;
    } else log(`no answer to ${kind} on control`);
    status("idle", asker.header);
  }
}

async function serveStdin(): Promise<void> {
  for await (const frames of stdin) {
    const read = decode(frames, connection.key);
    if ("refused" in read) log(`message on stdin dropped: ${read.refused}`);
    else if (read.message.header.msg_type === "input_reply" && asked) {
      giveAnswer(asked.reply, String(read.message.content["value"] ?? ""));
      asked = undefined;
    }
  }
}

async function serveHeartbeat(): Promise<void> {
  for await (const frames of heartbeat) await heartbeat.send(frames);
}

function interrupt(): void {
  if (asked) {
    giveAnswer(asked.reply, undefined);
    asked = undefined;
  }
  shared.stopRequested = true;
  interruptLadder({
    running: () => running,
    ask: () => tell({ type: "interrupt" }),
    signal: () => process.kill(process.pid, "SIGINT"),
    giveUp: () => {
      const text = "This cell cannot be interrupted; restart the kernel to stop it.\n";
      publisher.publish("stream", { name: "stderr", text }, lastParent);
    },
  });
}

let lastParent: Header | Record<string, never> = {};

port.on("message", (message: ToSockets) => {
  switch (message.type) {
    case "reply":
      publisher.flush();
      void reply(sendShell, message.asker, message.kind, message.content, message.metadata);
      break;
    case "publish":
      publisher.publish(message.kind, message.content, message.parent);
      break;
    case "running":
      running = message.cell;
      break;
    case "ask": {
      const id = randomUUID();
      asked = { id, reply: message.reply };
      publisher.flush();
      void reply(sendStdin, message.asker, "input_request", {
        prompt: message.prompt,
        password: message.password,
      });
      break;
    }
    case "cell":
      lastParent = message.parent;
      break;
    case "failed":
      void close();
      break;
  }
});

async function close(): Promise<void> {
  if (closing) return;
  closing = true;
  // A session that computes on without a pause cannot end itself.
  setTimeout(() => process.kill(process.pid, "SIGKILL"), 1500);
  publisher.flush();
  await new Promise((resolve) => setTimeout(resolve, 60));
  for (const socket of [shell, control, stdin, heartbeat, iopub]) socket.close();
  tell({ type: "shutdown" });
}

/** A kernel whose server died has nobody left to serve. */
function watchParent(): void {
  const parent = process.ppid;
  if (parent <= 1) return;
  setInterval(() => {
    if (process.ppid !== parent) void close();
  }, 2000).unref();
}

await Promise.all([
  shell.bind(address(connection, "shell")),
  control.bind(address(connection, "control")),
  stdin.bind(address(connection, "stdin")),
  heartbeat.bind(address(connection, "hb")),
  iopub.bind(address(connection, "iopub")),
]);
status("starting", {});
watchParent();
for (const serve of [serveShell, serveControl, serveStdin, serveHeartbeat]) {
  serve().catch((error) => {
    if (!closing) log(String(error));
  });
}
