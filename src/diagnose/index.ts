export type { CorrelogramPoint } from "./dependence.js";
export { Dependence, type DependenceOptions, dependence } from "./dependence.js";
export type { Fitted } from "./subject.js";
export type { Test } from "./test.js";
