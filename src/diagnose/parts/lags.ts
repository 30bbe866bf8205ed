/** A note on which lags a test looks at, unless they are simply 1 up to the highest. */
export function whichLags(lags: readonly number[]): { note?: string } {
  if (lags.every((lag, i) => lag === i + 1)) return {};
  return { note: lags.length === 1 ? `lag ${lags[0]} alone` : `lags ${lags.join(", ")}` };
}
