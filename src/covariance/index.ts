export { type BatchOptions, batches } from "./estimators/batches.js";
export { classical } from "./estimators/classical.js";
export { type CosineOptions, cosine } from "./estimators/cosine.js";
export { type HacOptions, hac, type NeweyWestOptions, neweyWest } from "./estimators/hac.js";
export { type WhiteType, white } from "./estimators/white.js";
