// The door of this room. Loading it says how every kind of result is shown.
import { showCharts } from "./presenters/chart.js";
import { dependenceShowing } from "./presenters/dependence.js";
import { fitShowing } from "./presenters/fit.js";
import { tableShowing } from "./presenters/table.js";
import { timeTableShowing } from "./presenters/time-table.js";
import { show } from "./showing.js";

showCharts();
show("table", tableShowing);
show("time-table", timeTableShowing);
show("fit", fitShowing);
show("dependence", dependenceShowing);

export { Chart } from "./chart/chart.js";
export { vegaLiteType } from "./chart/spec.js";
export { type LagbookRecord, recordType } from "./record.js";
export { chart, tableOf } from "./showing.js";
export type { Cell, Column, TableModel } from "./table/model.js";
export { Table } from "./table/table.js";
