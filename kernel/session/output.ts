/** What a session sends while a cell runs, as the messaging protocol names it. */
export type Output =
  | { type: "stream"; name: "stdout" | "stderr"; text: string }
  | { type: "display_data"; data: Bundle; metadata: Bundle; transient: Transient }
  | { type: "update_display_data"; data: Bundle; metadata: Bundle; transient: Transient }
  | { type: "execute_result"; data: Bundle; metadata: Bundle; execution_count: number }
  | { type: "error"; ename: string; evalue: string; traceback: string[] }
  | { type: "clear_output"; wait: boolean };

/** A MIME bundle, or its metadata. */
export type Bundle = Record<string, unknown>;

/** What a notebook does not keep of a display: the name by which it is updated. */
export interface Transient {
  display_id?: string;
}
