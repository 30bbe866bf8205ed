import { tablePart } from "../card/card.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import type { Table } from "../table/table.js";

/** A table by itself. */
export const tableShowing: Showing<Table> = {
  card: (table) => ({
    subject: table.title,
    headline: [],
    parts: [tablePart(table, htmlTable(table))],
    ...(table.fingerprint === undefined ? {} : { fingerprint: table.fingerprint }),
  }),
  tables: { table: (table) => table },
};
