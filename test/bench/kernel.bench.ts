/**
 * The kernel against Debian's general Python kernel (python3-ipykernel), both driven by the same client in one
 * run, in turns. Held to, as ratios: launch to first result at most 1.0, first reply at most 0.5, a warm cell at
 * most 4 (aim 2). PERIODWISE_BENCH_ROUNDS sets how many starts of each are measured.
 */
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { bench } from "vitest";
import { startKernelSession } from "../../src/casework/client/kernel-session.js";
import { isThere } from "../kernel/needed-program.js";

const rounds = Number(process.env["PERIODWISE_BENCH_ROUNDS"] ?? 5);
const warmCells = 30;
const python = "/usr/bin/python3";
const program = join(import.meta.dirname, "..", "..", "dist/src/cli/main.js");

interface Subject {
  readonly command: readonly string[];
  readonly cell: (i: number) => string;
}

const ours: Subject = {
  command: [process.execPath, program, "kernel"],
  cell: (i) => `const x${i} = ${i};\nx${i} + 1`,
};
const theirs: Subject = {
  command: [python, "-m", "ipykernel_launcher", "-f"],
  cell: (i) => `x${i} = ${i}\nx${i} + 1`,
};

/** Milliseconds: until the kernel answers, until its first result, and of a warm cell (median). */
async function measured({ command, cell }: Subject, folder: string): Promise<readonly number[]> {
  const start = performance.now();
  const conversation = await startKernelSession(command, folder);
  const answered = performance.now() - start;
  const run = (code: string) =>
    conversation.request("execute_request", { code, silent: false, store_history: true, allow_stdin: false });
  await run("1 + 1");
  const first = performance.now() - start;
  const warm: number[] = [];
  for (let i = 0; i < warmCells; i++) {
    const before = performance.now();
    await run(cell(i));
    warm.push(performance.now() - before);
  }
  await conversation.end();
  return [answered, first, median(warm)];
}

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? Number.NaN;
}

if (isThere(python, "-c", "import ipykernel")) {
  const folder = mkdtempSync(join(tmpdir(), "periodwise-bench-"));
  const own: (readonly number[])[] = [];
  const other: (readonly number[])[] = [];
  // The first start writes what later ones read.
  await measured(ours, folder);
  for (let round = 0; round < rounds; round++) {
    other.push(await measured(theirs, folder));
    own.push(await measured(ours, folder));
  }
  rmSync(folder, { recursive: true, force: true });
  for (const [index, what] of ["first reply", "launch to first result", "warm cell"].entries()) {
    const [mine, his] = [own, other].map((runs) => median(runs.map((run) => run[index] ?? Number.NaN)));
    const ratio = (mine ?? Number.NaN) / (his ?? Number.NaN);
    console.log(`${what}: ${mine?.toFixed(0)} ms, Python ${his?.toFixed(0)} ms, ratio ${ratio.toFixed(2)}`);
  }
}

bench("ours: start, first cell, thirty more, end", async () => void (await measured(ours, tmpdir())), {
  iterations: 2,
  warmupIterations: 0,
});
