import { readFileSync } from "node:fs";
import { incompleteConnectionFileError, unreadableConnectionFileError } from "../errors.js";

/**
 * Where a kernel listens and how its messages are signed.
 * @see Jupyter client documentation, "Connection files".
 */
export interface Connection {
  readonly transport: string;
  readonly ip: string;
  readonly key: string;
  readonly signature_scheme: string;
  readonly shell_port: number;
  readonly iopub_port: number;
  readonly stdin_port: number;
  readonly control_port: number;
  readonly hb_port: number;
}

const ports = ["shell_port", "iopub_port", "stdin_port", "control_port", "hb_port"] as const;

/** Reads a connection file. @throws {KernelError} `unreadable-connection-file` | `incomplete-connection-file`. */
export function readConnection(path: string): Connection {
  let given: Record<string, unknown>;
  try {
    given = JSON.parse(readFileSync(path, "utf8")) as Record<string, unknown>;
  } catch (cause) {
    throw unreadableConnectionFileError(path, cause);
  }
  for (const port of ports) {
    if (!Number.isInteger(given[port])) throw incompleteConnectionFileError(path, port);
  }
  if (typeof given["ip"] !== "string") throw incompleteConnectionFileError(path, "ip");
  // The checks above cover every field that has no default here.
  return { transport: "tcp", key: "", signature_scheme: "hmac-sha256", ...given } as Connection;
}

/** The address of one of the five channels, as the sockets expect it. */
export function address(connection: Connection, port: (typeof ports)[number]): string {
  const separator = connection.transport === "ipc" ? "-" : ":";
  return `${connection.transport}://${connection.ip}${separator}${connection[port]}`;
}
