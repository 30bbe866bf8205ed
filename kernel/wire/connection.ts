import { readFileSync } from "node:fs";

/** Ports and key that a Jupyter server wrote for the kernel. */
export interface Connection {
  readonly transport: string;
  readonly ip: string;
  readonly shell_port: number;
  readonly iopub_port: number;
  readonly stdin_port: number;
  readonly control_port: number;
  readonly hb_port: number;
  readonly key: string;
  readonly signature_scheme: string;
}

/** Reads a connection file. */
export function readConnection(path: string): Connection {
  const connection = JSON.parse(readFileSync(path, "utf8")) as Connection;
  const scheme = connection.signature_scheme;
  if (connection.key !== "" && scheme !== "hmac-sha256")
    throw new Error(`${path}: unknown signature scheme ${scheme}`);
  return connection;
}

/** Address of one of the ports. */
export function address(
  connection: Connection,
  port: "shell" | "iopub" | "stdin" | "control" | "hb",
): string {
  const separator = connection.transport === "ipc" ? "-" : ":";
  return `${connection.transport}://${connection.ip}${separator}${connection[`${port}_port`]}`;
}
