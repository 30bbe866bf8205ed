import { type CellOutput, type FileBundle, joined } from "./notebook.js";

/** What a session sends while a cell runs, as the messaging protocol names it. */
export type Sent =
  | { type: "stream"; name: "stdout" | "stderr"; text: string }
  | { type: "display_data"; data: FileBundle; metadata?: Record<string, unknown>; transient?: Transient }
  | {
      type: "update_display_data";
      data: FileBundle;
      metadata?: Record<string, unknown>;
      transient?: Transient;
    }
  | {
      type: "execute_result";
      data: FileBundle;
      metadata?: Record<string, unknown>;
      execution_count: number;
      transient?: Transient;
    }
  | { type: "error"; ename: string; evalue: string; traceback: readonly string[] }
  | { type: "clear_output"; wait: boolean };

interface Transient {
  display_id?: string | undefined;
}

/**
 * Turns what a session sends into the outputs that a notebook file keeps, as a front end does: stretches of one
 * stream are joined, an update replaces every earlier display of the same id in any cell, and a clearing that waits
 * takes effect at the next output.
 */
export class Collector {
  private outputs: CellOutput[] = [];
  private clearNext = false;
  private readonly shown = new Map<
    string,
    Extract<CellOutput, { output_type: "display_data" | "execute_result" }>[]
  >();

  /** Begins a cell: what is sent from now on goes into the returned list. */
  begin(): CellOutput[] {
    this.outputs = [];
    this.clearNext = false;
    return this.outputs;
  }

  /** Takes one sent output. */
  take(sent: Sent): void {
    if (sent.type === "clear_output") {
      if (sent.wait) this.clearNext = true;
      else this.outputs.length = 0;
      return;
    }
    if (sent.type === "update_display_data") {
      this.update(sent.transient?.display_id, sent.data, sent.metadata ?? {});
      return;
    }
    if (this.clearNext) {
      this.outputs.length = 0;
      this.clearNext = false;
    }
    if (sent.type === "stream") this.stream(sent.name, sent.text);
    else if (sent.type === "error") {
      const { ename, evalue, traceback } = sent;
      this.outputs.push({ output_type: "error", ename, evalue, traceback: [...traceback] });
    } else this.display(sent);
  }

  private stream(name: "stdout" | "stderr", text: string): void {
    const last = this.outputs.at(-1);
    if (last?.output_type === "stream" && last.name === name) last.text = joined(last.text) + text;
    else this.outputs.push({ output_type: "stream", name, text });
  }

  private display(sent: Extract<Sent, { type: "display_data" | "execute_result" }>): void {
    const { data, metadata = {} } = sent;
    const output =
      sent.type === "execute_result"
        ? { output_type: sent.type, data, metadata, execution_count: sent.execution_count }
        : { output_type: sent.type, data, metadata };
    this.outputs.push(output);
    const id = sent.transient?.display_id;
    if (id !== undefined) this.shown.set(id, [...(this.shown.get(id) ?? []), output]);
  }

  private update(id: string | undefined, data: FileBundle, metadata: Record<string, unknown>): void {
    if (id === undefined) return;
    for (const output of this.shown.get(id) ?? []) {
      output.data = data;
      output.metadata = metadata;
    }
  }
}
