/*
 * Two numbers that both threads see: how much stream text is on its way from the thread that runs cells to the sockets,
 * and whether the person wants the running cell to end. Messages would not do: a computing thread takes none.
 */
const [onTheWay, stop] = [0, 1];
/** Characters of stream text that may be on their way before cells have to wait. */
const most = 500_000;

/** The memory of both numbers, for the other thread. */
export function shareState(): SharedArrayBuffer {
  return new SharedArrayBuffer(8);
}

/** One thread's view of the shared state. */
export class SharedState {
  readonly #numbers: Int32Array;

  constructor(memory: SharedArrayBuffer) {
    this.#numbers = new Int32Array(memory);
  }

  /** Before text is handed over: waits while too much is on its way. */
  handOver(length: number): void {
    for (let present = this.#load(onTheWay); present > most; present = this.#load(onTheWay)) {
      Atomics.wait(this.#numbers, onTheWay, present, 100);
    }
    Atomics.add(this.#numbers, onTheWay, length);
  }

  /** After text has been sent. */
  sent(length: number): void {
    Atomics.sub(this.#numbers, onTheWay, length);
    Atomics.notify(this.#numbers, onTheWay);
  }

  get stopRequested(): boolean {
    return this.#load(stop) === 1;
  }

  set stopRequested(requested: boolean) {
    Atomics.store(this.#numbers, stop, requested ? 1 : 0);
  }

  #load(index: number): number {
    return Atomics.load(this.#numbers, index);
  }
}
