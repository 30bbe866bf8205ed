import type { BandwidthPath } from "../../covariance/index.js";
import { tablePart } from "../card/card.js";
import { bandwidthChart } from "../chart/bandwidth-path.js";
import { chartPart } from "../chart/part.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { rounded, statistic, type TableModel, words } from "../table/model.js";
import { name } from "../text/legible.js";
import { aboutFacts, aboutPrint } from "./about.js";

function rules(m: BandwidthPath): TableModel {
  return {
    title: `Standard error of ${name(m.term)} at each rule's bandwidth`,
    columns: [
      { key: "rule", title: "Rule" },
      { key: "bandwidth", title: "Bandwidth", align: "decimal" },
      { key: "se", title: "SE", align: "decimal" },
      { key: "ratio", title: "× classical", align: "decimal" },
    ],
    rows: m.marks.map(({ rule, bandwidth, se }) => [
      words(rule),
      rounded(bandwidth),
      statistic(se),
      statistic(se / m.classicalSe, 3),
    ]),
  };
}

function path(m: BandwidthPath): TableModel {
  return {
    title: `Standard error of ${name(m.term)} at each bandwidth`,
    columns: [
      { key: "bandwidth", title: "Bandwidth", align: "right" },
      { key: "se", title: "SE", align: "decimal" },
      { key: "ratio", title: "× classical", align: "decimal" },
    ],
    rows: Array.from(m.bandwidths, (bandwidth, i) => [
      rounded(bandwidth),
      statistic(m.se[i]!),
      statistic(m.se[i]! / m.classicalSe, 3),
    ]),
  };
}

/** The standard error of a coefficient against the bandwidth. */
export const bandwidthPathShowing: Showing<BandwidthPath> = {
  card: async (m) => {
    const table = rules(m);
    return {
      subject: m.outcome,
      headline: [`standard error of ${name(m.term)} by bandwidth`, m.kernel, ...aboutFacts(m.about)],
      finding: m.finding,
      remarks: m.remarks,
      parts: [await chartPart(bandwidthChart(m)), tablePart(table, htmlTable(table))],
      ...aboutPrint(m.about),
    };
  },
  tables: { rules, path },
  charts: { path: bandwidthChart },
};
