import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { protocolVersion } from "./message.js";

/** Content of a `kernel_info_reply`. */
export function kernelInfo(): Record<string, unknown> {
  const version = packageVersion();
  return {
    status: "ok",
    protocol_version: protocolVersion,
    implementation: "lagbook",
    implementation_version: version,
    language_info: {
      name: "typescript",
      version: "5.0.4",
      mimetype: "text/x-typescript",
      file_extension: ".ts",
      pygments_lexer: "typescript",
      codemirror_mode: { name: "javascript", typescript: true },
      nbconvert_exporter: "script",
    },
    banner: `Lagbook ${version}: regression on time-ordered data`,
    debugger: false,
    help_links: [],
    supported_features: [],
  };
}

function packageVersion(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, "package.json"))) folder = dirname(folder);
  return (JSON.parse(readFileSync(join(folder, "package.json"), "utf8")) as { version: string }).version;
}
