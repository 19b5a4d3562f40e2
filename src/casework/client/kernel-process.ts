import { type ChildProcess, spawn } from "node:child_process";
import { randomUUID } from "node:crypto";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Connection } from "../../kernel/index.js";
import { kernelEndedError } from "../errors.js";
import { freePorts } from "./free-ports.js";

/** Program and arguments that start a kernel; the path of the connection file follows them. */
export type KernelCommand = readonly string[];

/** A kernel process started here. */
export interface KernelProcess {
  readonly connection: Connection;
  readonly child: ChildProcess;
  /** Rejects when the process ends; never resolves. Every await is raced against it. */
  readonly ended: Promise<never>;
  /** Ends the process if it is still running, and removes its connection file. */
  readonly dispose: () => Promise<void>;
}

const maxLogLength = 2_000;
const shutdownTimeoutMs = 3_000;

/** Starts a kernel whose cells run in `folder`. */
export async function startKernelProcess(command: KernelCommand, folder: string): Promise<KernelProcess> {
  const [shell_port = 0, iopub_port = 0, stdin_port = 0, control_port = 0, hb_port = 0] = await freePorts(5);
  const ports = { shell_port, iopub_port, stdin_port, control_port, hb_port };
  const key = randomUUID();
  const connection = { transport: "tcp", ip: "127.0.0.1", signature_scheme: "hmac-sha256", key, ...ports };
  const folderForConnection = mkdtempSync(join(tmpdir(), "periodwise-"));
  const file = join(folderForConnection, "connection.json");
  writeFileSync(file, JSON.stringify(connection), { mode: 0o600 });

  const [program = process.execPath, ...given] = command;
  // The kernel watches this process and exits with it.
  const env = { ...process.env, JPY_PARENT_PID: String(process.pid) };
  const child = spawn(program, [...given, file], { cwd: folder, env, stdio: ["ignore", "pipe", "pipe"] });
  let log = "";
  const listen = (chunk: Buffer): void => {
    log = (log + chunk.toString()).slice(-maxLogLength);
  };
  child.stdout.on("data", listen);
  child.stderr.on("data", listen);
  const exited = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  const failed = new Promise<never>((_, reject) => child.once("error", (cause) => reject(cause)));
  const ended = Promise.race([exited.then(() => Promise.reject(kernelEndedError(log))), failed]);
  // Not every race awaits it, and it must not count as unhandled there.
  ended.catch(() => undefined);
  return {
    connection,
    child,
    ended,
    dispose: async () => {
      if (child.exitCode === null && child.signalCode === null && child.pid !== undefined) {
        const timeout = setTimeout(() => child.kill("SIGKILL"), shutdownTimeoutMs);
        await exited;
        clearTimeout(timeout);
      }
      rmSync(folderForConnection, { recursive: true, force: true });
    },
  };
}
