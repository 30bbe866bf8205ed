import { createRequire } from "node:module";
import { dirname } from "node:path";
import { MessageChannel, receiveMessageOnPort, Worker } from "node:worker_threads";
import type { SessionOptions } from "../session/index.js";
import type { ToSession, ToSockets } from "./between.js";
import { readConnection } from "./connection.js";
import { Requests } from "./requests.js";
import { SharedState, shareState } from "./shared.js";

const require = createRequire(import.meta.url);

/**
 * Runs a kernel on the ports of a connection file until it is told to shut down. The sockets' thread starts first and
 * answers at once; the session, with its compiler, follows.
 */
export async function startKernel(connectionFile: string): Promise<void> {
  const connection = readConnection(connectionFile);
  const { port1: port, port2: theirs } = new MessageChannel();
  const memory = shareState();
  const worker = new Worker(new URL("./sockets-thread.js", import.meta.url), {
    workerData: { connection, port: theirs, memory },
    transferList: [theirs],
  });
  const tell = (message: ToSockets) => port.postMessage(message);
  const waiting: ToSession[] = [];
  let requests: Requests | undefined;
  const take = (message: ToSession) => {
    if (message.type === "shutdown") process.exit(0);
    else if (!requests) waiting.push(message);
    else if (message.type === "interrupt") requests.interrupt();
    else requests.add(message);
  };
  port.on("message", take);
  worker.on("error", (error) => {
    process.stderr.write(`lagbook kernel: ${error.stack}\n`);
    process.exit(1);
  });
  // Without a listener the interrupt signal would end the process between cells.
  process.on("SIGINT", () => requests?.interrupt());
  const drain = () => {
    for (let next = receiveMessageOnPort(port); next; next = receiveMessageOnPort(port)) {
      take(next.message as ToSession);
    }
  };
  try {
    // Loading the session's few hundred modules one after the other takes less time than through promises.
    const { createSession } = require("../session/index.js") as typeof import("../session/index.js");
    const open = (options: Omit<SessionOptions, "directory">) =>
      createSession({ directory: notebookFolder(), ...options });
    requests = await Requests.open(tell, open, drain, new SharedState(memory));
  } catch (error) {
    process.stderr.write(`lagbook kernel: the session could not start: ${(error as Error).stack}\n`);
    tell({ type: "failed" });
    return;
  }
  for (const message of waiting) take(message);
  drain();
  requests.warm();
}

/** Jupyter starts kernels in the notebook's folder. */
function notebookFolder(): string {
  return process.env["JPY_SESSION_NAME"]?.startsWith("/")
    ? dirname(process.env["JPY_SESSION_NAME"])
    : process.cwd();
}
