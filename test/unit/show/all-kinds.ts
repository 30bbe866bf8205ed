import {
  bandwidthPath,
  combine,
  covariances,
  hac,
  jointly,
  neweyWest,
  white,
} from "../../../src/covariance/index.js";
import {
  displaySymbol,
  look,
  type MimeBundle,
  type Result,
  type TimeTable,
} from "../../../src/data/index.js";
import { lag } from "../../../src/design/index.js";
import {
  checkup,
  cointegration,
  dependence,
  form,
  integration,
  leverage,
  spread,
  stability,
} from "../../../src/diagnose/index.js";
import { estimate, type Fit } from "../../../src/estimate/index.js";
import "../../../src/show/index.js";
import { hostile } from "./hostile.js";
import { hostileTable, outcome } from "./hostile-table.js";

/** A result of every kind, by its kind, all of data with hostile names. */
export interface AllKinds {
  readonly table: TimeTable;
  readonly fit: Fit;
  readonly results: ReadonlyMap<string, Result>;
}

/** Makes a result of every kind from the table of hostile names. */
export async function allKinds(): Promise<AllKinds> {
  const table = await hostileTable();
  const unbroken = table.between(undefined, "2014-12");
  const terms = [...hostile, lag(hostile[0], 1)];
  const fit = estimate(table, outcome, terms, { missing: "leave out" }, neweyWest());
  const draws = { draws: 49 };
  const results: Result[] = [
    table,
    fit,
    look(table, [outcome, ...hostile]),
    dependence(fit),
    spread(fit),
    form(fit, draws),
    leverage(fit),
    stability(fit, { draws: 49, breaks: 2 }),
    integration(unbroken, [hostile[0], hostile[2]]),
    cointegration(unbroken, [hostile[0], hostile[1]]),
    checkup(fit, draws),
    covariances(fit, [white("HC1"), neweyWest(), hac({ kernel: "truncated", bandwidth: 3 })]),
    bandwidthPath(fit, hostile[1]),
    jointly(fit, [hostile[0], { [hostile[1]]: 1, [hostile[2]]: -1 }]),
    combine(fit, { [hostile[0]]: 1, [hostile[3]]: -2 }),
  ];
  return { table, fit, results: new Map(results.map((result) => [result.kind, result])) };
}

/** What a notebook is sent for a result. */
export async function shown(result: Result): Promise<MimeBundle> {
  return result[displaySymbol]();
}
