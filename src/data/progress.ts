/** How far a long piece of work has come. */
export interface Progress {
  /** What is being done: `load weeks.csv`. */
  readonly task: string;
  /** Units done so far. */
  readonly done: number;
  /** Units in all, where known. */
  readonly total?: number;
  /** What a unit is: `rows`, `replications`. */
  readonly unit: string;
  /** Whether this is the last report. */
  readonly finished: boolean;
}

type Sink = (progress: Progress) => void;
let sink: Sink | undefined;

/** Says where progress is shown; a notebook's session sets this. Without a sink it goes nowhere. */
export function showProgressIn(target: Sink | undefined): void {
  sink = target;
}

/** Starts a report of progress that shows only when the work takes longer than a second, ten times a second at most. */
export function reportProgress(
  task: string,
  unit: string,
  total?: number,
): { at(done: number, total?: number): void; end(done: number): void } {
  const begun = Date.now();
  let last = begun;
  let shown = false;
  let size = total === undefined ? {} : { total };
  return {
    at(done, newTotal) {
      if (newTotal !== undefined) size = { total: newTotal };
      const now = Date.now();
      if (!sink || now - begun < 1000 || now - last < 100) return;
      last = now;
      shown = true;
      sink({ task, done, unit, finished: false, ...size });
    },
    end(done) {
      if (shown) sink?.({ task, done, unit, finished: true, ...size });
    },
  };
}
