import * as lagbook from "../../src/index.js";
import * as notebook from "./notebook.js";

/** Modules of Lagbook's own, which cells can import from any folder. */
export const ownModules: Readonly<Record<string, Readonly<Record<string, unknown>>>> = {
  lagbook,
  "lagbook/notebook": notebook,
};

/** Names that cells have without importing them, by the module that they come from. */
const given: Readonly<Record<string, readonly string[]>> = {
  lagbook: Object.keys(lagbook),
  "lagbook/notebook": ["ask", "clearOutput", "display"] satisfies (keyof typeof notebook)[],
};

/** Their declarations, as a cell that imports them would leave them. */
export const givenDeclarations = Object.entries(given)
  .map(([module, names]) => `import { ${names.join(", ")} } from ${JSON.stringify(module)};\n`)
  .join("");

/** Their values. */
export const givenNames: Readonly<Record<string, unknown>> = Object.fromEntries(
  Object.entries(given).flatMap(([module, names]) => names.map((name) => [name, ownModules[module]![name]])),
);
