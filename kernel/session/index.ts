export type { Completions } from "./completion/completions.js";
export type { Inspection } from "./inspect.js";
export type { Completeness } from "./is-complete.js";
export type { Bundle, Output, Transient } from "./output.js";
export {
  createSession,
  type ExecuteOptions,
  type ExecuteReply,
  type Session,
  type SessionOptions,
} from "./session.js";
