import { InputError } from "../../numeric/index.js";

/** Which lags the tests look at. */
export interface LagChoice {
  /** Joint tests cover lags 1 up to each of these, ascending. */
  readonly orders: readonly number[];
  /** The highest of them. */
  readonly highest: number;
  /** Seasonal lags that are tested on their own. */
  readonly seasonal: readonly number[];
  /** How far the correlogram reaches. */
  readonly shown: number;
}

/**
 * Joint tests at lag 1 and up to min(10, T/5), or min(2s, T/5) where a season of at most 12 periods is known; the
 * seasonal lags s and 2s alone beside them, as long as ten pairs of periods stand that far apart. Asked lags replace
 * the joint ones: a number is the highest lag, a list the highest lags of several joint tests. Refused at T − k and above.
 */
export function chooseLags(
  T: number,
  k: number,
  season: number | undefined,
  asked?: number | readonly number[],
): LagChoice {
  const most = T - k - 1;
  let orders: number[];
  if (asked === undefined) {
    const wanted = season !== undefined && season > 1 && season <= 12 ? 2 * season : 10;
    const order = Math.max(1, Math.min(wanted, Math.floor(T / 5), most));
    orders = order > 1 ? [1, order] : [1];
  } else {
    orders = [...new Set(typeof asked === "number" ? [asked] : asked)].sort((a, b) => a - b);
    if (orders.length === 0)
      throw new InputError("dependence: lags is an empty list; give at least one lag.");
    for (const lag of orders) {
      if (!Number.isInteger(lag) || lag < 1)
        throw new InputError(`dependence: lags must be whole numbers from 1 up, not ${lag}.`);
      if (lag > most)
        throw new InputError(
          `dependence: lags = ${lag} is too many for ${T} periods and ${k} coefficients (T − k = ${T - k}); ` +
            `${most > 0 ? `at most ${most} can be tested` : "no lag can be tested"}.`,
        );
    }
  }
  const highest = orders[orders.length - 1]!;
  const seasonal =
    season !== undefined && season > 1
      ? [season, 2 * season].filter((lag) => lag <= most && T - lag >= 10)
      : [];
  const shown = Math.min(T - 1, Math.max(20, highest, ...seasonal));
  return { orders, highest, seasonal, shown };
}
