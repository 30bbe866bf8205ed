import type { ExecuteOptions, ExecuteReply, Output, Session, SessionOptions } from "../session/index.js";
import { answerMemory, takeAnswer } from "./answer.js";
import type { Asker, ToSession, ToSockets } from "./between.js";
import { toPoints, toUnits } from "./code-points.js";
import { History } from "./history.js";
import type { Header } from "./message.js";
import type { SharedState } from "./shared.js";

type Request = Extract<ToSession, { type: "request" }>;
type Content = Readonly<Record<string, unknown>>;
const quietMilliseconds = 3000;

/** Answers the requests of the shell channel one after another. */
export class Requests {
  readonly #tell: (message: ToSockets) => void;
  readonly #drain: () => void;
  readonly #shared: SharedState;
  readonly #history = new History();
  readonly #queue: Request[] = [];
  #session!: Session;
  #busy = false;
  #cell = 0;
  #asker: Asker | undefined;
  #allowInput = false;

  private constructor(tell: (message: ToSockets) => void, drain: () => void, shared: SharedState) {
    this.#tell = tell;
    this.#drain = drain;
    this.#shared = shared;
  }

  static async open(
    tell: (message: ToSockets) => void,
    open: (options: Omit<SessionOptions, "directory">) => Promise<Session>,
    drain: () => void,
    shared: SharedState,
  ): Promise<Requests> {
    const requests = new Requests(tell, drain, shared);
    requests.#session = await open({
      emit: (output) => requests.#publish(output, requests.#asker?.header ?? {}),
      readInput: (question, hidden) => requests.#readInput(question, hidden),
      stopRequested: () => shared.stopRequested,
    });
    return requests;
  }

  interrupt(): void {
    this.#session.interrupt();
  }

  /** Readies the session for its first cell, if nobody is waiting yet, and in a quiet moment the next session's start. */
  warm(): void {
    if (!this.#busy) this.#session.warm();
    const quiet = setInterval(() => {
      if (this.#busy) return;
      clearInterval(quiet);
      this.#session.keep();
    }, quietMilliseconds).unref();
  }

  add(request: Request): void {
    this.#queue.push(request);
    if (!this.#busy) void this.#work();
  }

  async #work(): Promise<void> {
    this.#busy = true;
    for (let request = this.#queue.shift(); request; request = this.#queue.shift()) {
      const { header } = request.message;
      this.#status("busy", header);
      try {
        await this.#answer(request);
      } catch (error) {
        process.stderr.write(`lagbook kernel: ${header.msg_type} failed: ${(error as Error).stack}\n`);
        this.#reply(request, { status: "error", ename: "Error", evalue: String(error), traceback: [] });
      }
      this.#status("idle", header);
    }
    this.#busy = false;
  }

  async #answer(request: Request): Promise<void> {
    const { header, content } = request.message;
    switch (header.msg_type) {
      case "execute_request":
        return this.#execute(request, content);
      case "complete_request":
        return this.#reply(request, this.#complete(content));
      case "inspect_request": {
        const code = String(content["code"] ?? "");
        const offset = toUnits(code, Number(content["cursor_pos"] ?? code.length));
        const { found, data } = this.#session.inspect(code, offset, Number(content["detail_level"] ?? 0));
        return this.#reply(request, { status: "ok", found, data, metadata: {} });
      }
      case "is_complete_request": {
        const { status, indent } = this.#session.isComplete(String(content["code"] ?? ""));
        return this.#reply(request, status === "incomplete" ? { status, indent: indent ?? "" } : { status });
      }
      case "history_request":
        return this.#reply(request, { status: "ok", history: this.#history.answer(content) });
      case "comm_info_request":
        return this.#reply(request, { status: "ok", comms: {} });
      case "comm_open": // no comm targets here: close it, as the protocol asks
        this.#tell({
          type: "publish",
          parent: header,
          kind: "comm_close",
          content: { comm_id: content["comm_id"], data: {} },
        });
        return;
      case "comm_msg":
      case "comm_close":
        return;
      case "shutdown_request":
        this.#reply(request, { status: "ok", restart: content["restart"] === true });
        this.#tell({ type: "failed" });
        return;
      default:
        process.stderr.write(`lagbook kernel: no answer to ${header.msg_type}\n`);
    }
  }

  async #execute(request: Request, content: Content): Promise<void> {
    const { header } = request.message;
    const code = String(content["code"] ?? "");
    const silent = content["silent"] === true;
    const storeHistory = !silent && content["store_history"] !== false;
    this.#asker = { identities: request.identities, header };
    this.#allowInput = content["allow_stdin"] !== false;
    this.#tell({ type: "cell", parent: header });
    const userExpressions = (content["user_expressions"] ?? {}) as Record<string, string>;
    const reply = await this.#run(code, header, { silent, storeHistory, userExpressions });
    const aborted = reply.status === "error" && content["stop_on_error"] !== false ? this.#takeWaiting() : [];
    this.#reply(request, reply.status === "ok" ? { payload: [], ...reply } : { ...reply });
    for (const waiting of aborted) this.#abort(waiting);
  }

  async #run(code: string, header: Header, options: ExecuteOptions): Promise<ExecuteReply> {
    const { silent, storeHistory } = options;
    this.#shared.stopRequested = false;
    this.#tell({ type: "running", cell: ++this.#cell });
    try {
      return await this.#session.execute(code, {
        ...options,
        emit: (output) => {
          if (output.type === "execute_result" && storeHistory) {
            this.#history.addOutput(String(output.data["text/plain"] ?? ""));
          }
          this.#publish(output, header);
        },
        started: (count) => {
          if (silent) return;
          if (storeHistory) this.#history.add(count, code);
          const input = { code, execution_count: count };
          this.#tell({ type: "publish", parent: header, kind: "execute_input", content: input });
        },
      });
    } finally {
      this.#tell({ type: "running", cell: undefined });
    }
  }

  /** The execute requests that were waiting when a cell failed. */
  #takeWaiting(): Request[] {
    this.#drain();
    const isExecute = (request: Request) => request.message.header.msg_type === "execute_request";
    const waiting = this.#queue.filter(isExecute);
    const others = this.#queue.filter((request) => !isExecute(request));
    this.#queue.splice(0, this.#queue.length, ...others);
    return waiting;
  }

  #abort(request: Request): void {
    this.#status("busy", request.message.header);
    this.#reply(request, { status: "aborted" });
    this.#status("idle", request.message.header);
  }

  #complete(content: Content): Record<string, unknown> {
    const code = String(content["code"] ?? "");
    const offset = toUnits(code, Number(content["cursor_pos"] ?? code.length));
    const { matches, start, end, types } = this.#session.complete(code, offset);
    const [from, to] = [toPoints(code, start), toPoints(code, end)];
    return {
      status: "ok",
      matches,
      cursor_start: from,
      cursor_end: to,
      metadata: {
        _jupyter_types_experimental: matches.map((text, i) => ({
          start: from,
          end: to,
          text,
          type: types[i],
        })),
      },
    };
  }

  #readInput(question: string, hidden: boolean): string | undefined {
    if (!this.#asker || !this.#allowInput) throw new Error("ask: this front end does not answer questions");
    const memory = answerMemory();
    this.#tell({ type: "ask", asker: this.#asker, prompt: question, password: hidden, reply: memory });
    return takeAnswer(memory);
  }

  #reply(request: Request, content: Record<string, unknown>): void {
    const kind = request.message.header.msg_type.replace(/_request$/, "_reply");
    this.#tell({
      type: "reply",
      asker: { identities: request.identities, header: request.message.header },
      kind,
      content,
    });
  }

  #status(state: "busy" | "idle", parent: Header): void {
    this.#tell({ type: "publish", parent, kind: "status", content: { execution_state: state } });
  }

  #publish(output: Output, parent: Header | Record<string, never>): void {
    const { type, ...content } = output;
    if (output.type === "stream") this.#shared.handOver(output.text.length);
    this.#tell({ type: "publish", parent, kind: type, content });
  }
}
