import { type Progress, showProgressIn } from "../../src/data/index.js";
import { cellContext } from "./cell-context.js";

/** Draws the progress of long work in place, in the cell that started it. */
export function showProgress(): void {
  const started = new Map<string, { id: string; at: number }>();
  showProgressIn((progress) => {
    const cell = cellContext.getStore();
    if (!cell) return;
    const known = started.get(progress.task);
    const place = known ?? { id: cell.nextDisplayId(), at: Date.now() };
    if (!known) started.set(progress.task, place);
    if (progress.finished) started.delete(progress.task);
    const seconds = (Date.now() - place.at) / 1000;
    cell.emit({
      type: known ? "update_display_data" : "display_data",
      data: { "text/plain": line(progress, seconds), "text/html": bar(progress, seconds) },
      metadata: {},
      transient: { display_id: place.id },
    });
  });
}

function line({ task, done, total, unit, finished }: Progress, seconds: number): string {
  const count =
    total === undefined ? `${done.toLocaleString("en")} ${unit}` : `${Math.floor((100 * done) / total)} %`;
  const left =
    total !== undefined && done > 0 && !finished
      ? `, about ${Math.ceil((seconds * (total - done)) / done)} s left`
      : "";
  return `${task}: ${count}${finished ? ", done" : left}`;
}

function bar(progress: Progress, seconds: number): string {
  const text = line(progress, seconds).replaceAll("&", "&amp;").replaceAll("<", "&lt;");
  const { done, total, finished } = progress;
  const value = total === undefined ? (finished ? ' value="1"' : "") : ` value="${done / total}"`;
  return `<div><progress max="1"${value} style="width: 16em"></progress> ${text}</div>`;
}
