/*
 * The door of this room. Loading it says how every kind of result is shown.
 *
 * What JupyterLab 4.6 does to what it is sent (found in its public source, apputils' sanitizer.ts, and held by
 * test/browser/show.test.ts):
 * - In a bundle text/html comes before Vega-Lite, Vega-Lite before image/svg+xml; so cards are HTML with pictures inside, and a
 *   chart has no HTML. Vega-Lite is drawn up to MIME version 5 only, by its own Vega-Lite 5.6, trusted or not.
 * - An untrusted output loses style and script elements, inline SVG, identifiers, role and aria attributes, and styles that are not
 *   on a list: var(), calc(), inherit, transform, font-variant-numeric. It keeps details, tables, class, title, inline styles
 *   (position, grid and flex, borders, rgba()), and images with data in their address.
 * - MathJax reads dollar signs in HTML unless a class says not to. Zebra rows and right-aligned cells are its style sheet's.
 */

import { bandwidthPathShowing } from "./presenters/bandwidth-path.js";
import { showCharts } from "./presenters/chart.js";
import { checkupShowing } from "./presenters/checkup.js";
import { cointegrationShowing } from "./presenters/cointegration.js";
import { combinationShowing } from "./presenters/combination.js";
import { covariancesShowing } from "./presenters/covariances.js";
import { dependenceShowing } from "./presenters/dependence.js";
import { fitShowing } from "./presenters/fit.js";
import { formShowing } from "./presenters/form.js";
import { integrationShowing } from "./presenters/integration.js";
import { jointTestShowing } from "./presenters/joint-test.js";
import { leverageShowing } from "./presenters/leverage.js";
import { lookShowing } from "./presenters/look.js";
import { spreadShowing } from "./presenters/spread.js";
import { stabilityShowing } from "./presenters/stability.js";
import { tableShowing } from "./presenters/table.js";
import { timeTableShowing } from "./presenters/time-table.js";
import { show } from "./showing.js";

showCharts();
show("table", tableShowing);
show("time-table", timeTableShowing);
show("fit", fitShowing);
show("look", lookShowing);
show("covariances", covariancesShowing);
show("bandwidth-path", bandwidthPathShowing);
show("joint-test", jointTestShowing);
show("combination", combinationShowing);
show("dependence", dependenceShowing);
show("checkup", checkupShowing);
show("cointegration", cointegrationShowing);
show("integration", integrationShowing);
show("stability", stabilityShowing);
show("leverage", leverageShowing);
show("form", formShowing);
show("spread", spreadShowing);

export { Chart } from "./chart/chart.js";
export { vegaLiteType } from "./chart/spec.js";
export { type LagbookRecord, recordType } from "./record.js";
export { chart, tableOf } from "./showing.js";
export type { Cell, Column, TableModel } from "./table/model.js";
export { Table } from "./table/table.js";
