/*
 * The answer to a question of a cell, which waits for it without a pause: the thread with the sockets writes it into
 * memory that both threads see, and wakes the other.
 */
const [state, length, text] = [0, 1, 8];
const [answered, interrupted, tooLong] = [1, 2, 3];
const room = 65_536;

/** Memory for one answer. */
export function answerMemory(): SharedArrayBuffer {
  return new SharedArrayBuffer(text + room);
}

/** Writes an answer, or (undefined) that the question was interrupted, and wakes the thread that waits. */
export function giveAnswer(memory: SharedArrayBuffer, answer: string | undefined): void {
  const flags = new Int32Array(memory, 0, 2);
  const bytes = Buffer.from(answer ?? "", "utf8");
  const fits = bytes.length <= room;
  if (fits) new Uint8Array(memory, text).set(bytes);
  flags[length] = fits ? bytes.length : 0;
  Atomics.store(flags, state, answer === undefined ? interrupted : fits ? answered : tooLong);
  Atomics.notify(flags, state);
}

/** Waits for the answer: undefined when interrupted. */
export function takeAnswer(memory: SharedArrayBuffer): string | undefined {
  const flags = new Int32Array(memory, 0, 2);
  Atomics.wait(flags, state, 0);
  switch (Atomics.load(flags, state)) {
    case interrupted:
      return undefined;
    case tooLong:
      throw new Error(`ask: the answer is longer than ${room} bytes; put it into a file and load that`);
    default:
      return Buffer.from(new Uint8Array(memory, text, flags[length])).toString("utf8");
  }
}
