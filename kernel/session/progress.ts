import { type Progress, showProgressIn } from "../../src/data/index.js";
import { type CellContext, cellContext } from "./cell-context.js";
import { Interrupted } from "./interruption.js";

/** Draws the progress of long work in place, in the cell that started it, and ends the work if the cell is to end. */
export function showProgress(): void {
  const drawn = new WeakMap<CellContext, Map<string, Place>>();
  showProgressIn((progress) => {
    const cell = cellContext.getStore();
    if (!cell) return;
    const places = drawn.get(cell) ?? new Map<string, Place>();
    drawn.set(cell, places);
    const known = places.get(progress.task);
    const stopped = !progress.finished && cell.stopRequested();
    if (stopped && !known) throw new Interrupted();
    const place = known ?? { id: cell.nextDisplayId(), at: Date.now() };
    if (progress.finished || stopped) places.delete(progress.task);
    else places.set(progress.task, place);
    const text = stopped ? `${progress.task}: interrupted` : line(progress, (Date.now() - place.at) / 1000);
    cell.emit({
      type: known ? "update_display_data" : "display_data",
      data: { "text/plain": text, "text/html": stopped ? escaped(text) : bar(progress, text) },
      metadata: {},
      transient: { display_id: place.id },
    });
    if (stopped) throw new Interrupted();
  });
}

/** Where a piece of work is drawn, and since when. */
interface Place {
  readonly id: string;
  readonly at: number;
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

function bar({ done, total, finished }: Progress, text: string): string {
  const value = total === undefined ? (finished ? ' value="1"' : "") : ` value="${done / total}"`;
  return `<div><progress max="1"${value} style="width: 16em"></progress> ${escaped(text)}</div>`;
}

function escaped(text: string): string {
  return text.replaceAll("&", "&amp;").replaceAll("<", "&lt;");
}
