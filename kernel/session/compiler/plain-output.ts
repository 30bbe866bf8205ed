/**
 * Lets a compiled cell set its names as plain properties: imported ones too, which could not be replaced otherwise, and
 * none before its value is there, so that a cell that fails leaves earlier values as they were. An import of a computed
 * name becomes a real one, where `require` could not load the module.
 */
export function plainOutput(js: string): string {
  return js
    .replace(/^Object\.defineProperty\(exports, "__esModule", \{ value: true \}\);$/m, "")
    .replace(/^(?:exports\.[^\s=]+ = )+void 0;$/m, "")
    .replace(
      /^Object\.defineProperty\(exports, "([^"]+)", \{ enumerable: true, get: function \(\) \{ return (.+); \} \}\);$/gm,
      (_, name, value) => `exports.${name} = ${value};`,
    )
    .replaceAll(
      ".then(s => __importStar(require(s)))",
      ".then(async (s) => __importStar(await require.prepared(s)))",
    );
}
