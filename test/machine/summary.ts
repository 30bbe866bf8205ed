/** The counts with which a TAP report of Node's test runner closes. */
export interface Summary {
  readonly tests: number;
  readonly pass: number;
  readonly fail: number;
  readonly cancelled: number;
  readonly skipped: number;
  readonly todo: number;
  /** The lines of the tests that were skipped or are yet to be written. */
  readonly left: readonly string[];
}

/** Reads the closing counts of a TAP report; all zero if the report breaks off before them. */
export function readSummary(tap: string): Summary {
  const count = (name: string) => Number(new RegExp(`^# ${name} (\\d+)$`, "m").exec(tap)?.[1] ?? 0);
  return {
    tests: count("tests"),
    pass: count("pass"),
    fail: count("fail"),
    cancelled: count("cancelled"),
    skipped: count("skipped"),
    todo: count("todo"),
    left: tap
      .split("\n")
      .map((line) => line.trim())
      .filter((line) => /^(not )?ok \d+ .*# (SKIP|TODO)/.test(line)),
  };
}
