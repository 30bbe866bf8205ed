import { Worker } from "node:worker_threads";

/*
 * A cell that computes without a pause keeps every timer of its thread from firing, so the time limit is watched from
 * another thread. That thread first asks the session's thread to interrupt the cell; if the thread is too busy to
 * answer, it sends the process the interrupt signal, which stops synchronous code. A loop that even this can't stop
 * (inside a timer, say) leaves only the end of the process, said on standard error.
 */
const program = `
const { parentPort, workerData } = require("node:worker_threads");
const { writeSync } = require("node:fs");
const { answered, grace } = workerData;
const flag = new Int32Array(answered);
let pending = [];
const later = (ms, act) => pending.push(setTimeout(act, ms));
parentPort.on("message", ({ limit, what }) => {
  pending.forEach(clearTimeout);
  pending = [];
  Atomics.store(flag, 0, 0);
  if (limit === undefined) return;
  later(limit, () => {
    Atomics.store(flag, 1, 1);
    parentPort.postMessage("over");
    later(grace, () => { if (Atomics.load(flag, 0) === 0) process.kill(process.pid, "SIGINT"); });
    later(20 * grace, () => {
      writeSync(2, what + " ran past its time and cannot be interrupted. The run was ended; nothing was written.\\n");
      process.kill(process.pid, "SIGKILL");
    });
  });
});
`;

/** Watches one cell at a time. */
export interface Watchdog {
  /** Starts the clock for a cell; `what` names it, should the process have to be ended. */
  watch(what: string): void;
  /** Stops the clock. @returns whether the time ran out */
  rest(): boolean;
  close(): Promise<void>;
}

/**
 * Starts the watching thread.
 *
 * @param seconds how long a cell may take
 * @param interrupt asks the session to stop what it does
 * @param grace milliseconds between the request and the signal
 */
export function startWatchdog(seconds: number, interrupt: () => void, grace = 250): Watchdog {
  const shared = new SharedArrayBuffer(8);
  const flags = new Int32Array(shared);
  const worker = new Worker(program, { eval: true, workerData: { answered: shared, grace } });
  worker.unref();
  worker.on("message", () => {
    Atomics.store(flags, 0, 1);
    interrupt();
  });
  return {
    watch(what) {
      Atomics.store(flags, 1, 0);
      worker.postMessage({ limit: seconds * 1000, what });
    },
    rest() {
      worker.postMessage({});
      return Atomics.exchange(flags, 1, 0) === 1;
    },
    async close() {
      await worker.terminate();
    },
  };
}
