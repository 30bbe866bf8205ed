// The door of this room: running a notebook from start to end, the executed notebook and the page of it.
export type { Sent } from "./collector.js";
export { type RunCommand, runNotebooks } from "./command.js";
export { type OpenSession, type RerunFiles, rerunFile } from "./files.js";
export { type Notebook, NotebookError, parseNotebook, writeNotebook } from "./notebook.js";
export { notebookToPage, type PageOptions } from "./page/page.js";
export {
  type CellReply,
  type CellRunner,
  type Failure,
  type Rerun,
  type RerunOptions,
  rerun,
} from "./rerun.js";
