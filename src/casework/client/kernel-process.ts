import { type ChildProcess, spawn } from "node:child_process";
import { randomUUID } from "node:crypto";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Connection } from "../../kernel/index.js";
import { kernelEnded } from "../refusals.js";
import { freePorts } from "./free-ports.js";

/** Program and arguments that start a kernel; the path of the connection file follows them. */
export type KernelCommand = readonly string[];

/** A kernel started by us. */
export interface KernelProcess {
  readonly connection: Connection;
  readonly child: ChildProcess;
  /** Rejects when the process ends; never resolves. Every wait is raced against it. */
  readonly ended: Promise<never>;
  /** Ends the process if it still lives, and removes what was written for it. */
  readonly dispose: () => Promise<void>;
}

const lastWordsLength = 2_000;
const politeMs = 3_000;

/** Starts a kernel whose cells run in `folder`. */
export async function startKernelProcess(command: KernelCommand, folder: string): Promise<KernelProcess> {
  const [shell_port = 0, iopub_port = 0, stdin_port = 0, control_port = 0, hb_port = 0] = await freePorts(5);
  const ports = { shell_port, iopub_port, stdin_port, control_port, hb_port };
  const key = randomUUID();
  const connection = { transport: "tcp", ip: "127.0.0.1", signature_scheme: "hmac-sha256", key, ...ports };
  const place = mkdtempSync(join(tmpdir(), "periodwise-"));
  const file = join(place, "connection.json");
  writeFileSync(file, JSON.stringify(connection), { mode: 0o600 });

  const [program = process.execPath, ...given] = command;
  // The kernel watches the process named here and leaves with it.
  const env = { ...process.env, JPY_PARENT_PID: String(process.pid) };
  const child = spawn(program, [...given, file], { cwd: folder, env, stdio: ["ignore", "pipe", "pipe"] });
  let lastWords = "";
  const listen = (chunk: Buffer): void => {
    lastWords = (lastWords + chunk.toString()).slice(-lastWordsLength);
  };
  child.stdout.on("data", listen);
  child.stderr.on("data", listen);
  const exited = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  const failed = new Promise<never>((_, reject) => child.once("error", (cause) => reject(cause)));
  const ended = Promise.race([exited.then(() => Promise.reject(kernelEnded(lastWords))), failed]);
  // It is raced against in many places and must not count as unhandled where it is not.
  ended.catch(() => undefined);
  return {
    connection,
    child,
    ended,
    dispose: async () => {
      if (child.exitCode === null && child.signalCode === null && child.pid !== undefined) {
        const impatient = setTimeout(() => child.kill("SIGKILL"), politeMs);
        await exited;
        clearTimeout(impatient);
      }
      rmSync(place, { recursive: true, force: true });
    },
  };
}
