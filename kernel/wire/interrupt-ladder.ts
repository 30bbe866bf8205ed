/** What the ladder needs to know and can do. */
export interface Rungs {
  /** Number of the cell that runs now, if any. */
  running(): number | undefined;
  /** Asks the session to end a pending await. */
  ask(): void;
  /** Sends the process its interrupt signal, which stops synchronous code. */
  signal(): void;
  /** Says that nothing helped. */
  giveUp(): void;
}

/** Milliseconds after which the next rung is tried. */
const patience = { signal: 40, again: 400, giveUp: 1500 };

/** Stops the running cell, trying the next way only when the last did not bite within a moment. */
export function interruptLadder(rungs: Rungs): void {
  const cell = rungs.running();
  if (cell === undefined) return;
  const still = (act: () => void) => () => {
    if (rungs.running() === cell) act();
  };
  rungs.ask();
  setTimeout(still(rungs.signal), patience.signal);
  setTimeout(still(rungs.signal), patience.again);
  setTimeout(still(rungs.giveUp), patience.giveUp);
}
