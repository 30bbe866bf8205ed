// The door of this room. Loading it says how every kind of result is shown.

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
