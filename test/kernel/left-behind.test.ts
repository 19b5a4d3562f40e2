import { type ChildProcess, spawn } from "node:child_process";
import { once } from "node:events";
import { connect } from "node:net";
import { join } from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { describe, expect, test } from "vitest";
import { type KernelProcess, startKernelProcess } from "../../src/casework/client/kernel-process.js";
import type { Connection } from "../../src/kernel/index.js";
import { kernelCommand, root, testFolder } from "./kernel-in-test.js";

const ports = ["shell_port", "iopub_port", "stdin_port", "control_port", "hb_port"] as const;

function isListening(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = connect({ port, host: "127.0.0.1" });
    socket.once("connect", () => resolve(true)).once("error", () => resolve(false));
    socket.once("close", () => socket.destroy());
    setTimeout(() => socket.destroy(), 500);
  });
}

async function openPorts(connection: Connection): Promise<number> {
  const open = await Promise.all(ports.map((port) => isListening(connection[port])));
  return open.filter(Boolean).length;
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

async function until(holds: () => boolean | Promise<boolean>, ms: number): Promise<boolean> {
  for (const end = Date.now() + ms; Date.now() < end; await pause(50)) if (await holds()) return true;
  return holds();
}

// Source: common practice, no source; that nothing is left is our promise.
describe("two kernels at once", () => {
  test.each([20, 150, 400, 900, 2_000])("killed after %i ms leave no process and no port", async (ms) => {
    const folder = testFolder();
    const kernels = await Promise.all([1, 2].map(() => startKernelProcess(kernelCommand, folder)));
    await pause(ms);
    const exits = kernels.map(({ child }) => once(child, "exit"));
    for (const [index, { child }] of kernels.entries()) child.kill(index === 0 ? "SIGKILL" : "SIGTERM");
    await Promise.all(exits);
    for (const { connection } of kernels) expect(await openPorts(connection)).toBe(0);
    await Promise.all(kernels.map((kernel: KernelProcess) => kernel.dispose()));
  });
});

describe("a kernel whose front end is killed", () => {
  test("ends by itself", { timeout: 60_000 }, async () => {
    const folder = testFolder();
    const program = `
      const { startKernelProcess } = require(${JSON.stringify(join(root, "dist/src/casework/client/kernel-process.js"))});
      startKernelProcess(${JSON.stringify(kernelCommand)}, ${JSON.stringify(folder)}).then(({ child, connection }) =>
        console.log(JSON.stringify({ pid: child.pid, connection })));
      setInterval(() => undefined, 1000);`;
    const parent: ChildProcess = spawn(process.execPath, ["-e", program], {
      stdio: ["ignore", "pipe", "inherit"],
    });
    const [line] = (await once(parent.stdout!, "data")) as [Buffer];
    const { pid, connection } = JSON.parse(line.toString()) as { pid: number; connection: Connection };
    expect(await until(async () => (await openPorts(connection)) === ports.length, 20_000)).toBe(true);
    parent.kill("SIGKILL");
    expect(await until(() => !isAlive(pid), 15_000)).toBe(true);
    expect(await openPorts(connection)).toBe(0);
  });
});
