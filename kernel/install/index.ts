// The door of this room: setting up Python and JupyterLab, registering the kernel, starting JupyterLab.
export { ensureEnvironment, SetUpError } from "./environment.js";
export { type LabOptions, prepareHome } from "./jupyter.js";
export { canOpenBrowser } from "./opener.js";
export { type Places, packageRoot, places } from "./places.js";
export { prefixDataFolder, register, userDataFolder } from "./register.js";
export { type RunningLab, startLab } from "./server.js";
export { kernelName, kernelSpecification } from "./specification.js";
export { notebooksIn, type StartOptions, start } from "./start.js";
