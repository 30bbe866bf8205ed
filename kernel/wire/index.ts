export { startKernel } from "./start.js";
