import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** A C program made ready to be timed: each call runs it once and gives the numbers that it prints. */
export interface CompiledProgram {
  readonly run: (args: readonly string[]) => number[];
  readonly remove: () => void;
}

/**
 * Compiles a C program with gcc at -O2, without fused multiply-add and without relaxed arithmetic, so that it does
 * the same arithmetic as JavaScript. Undefined where there is no gcc.
 */
export function compiledInC(source: string): CompiledProgram | undefined {
  const folder = mkdtempSync(join(tmpdir(), "periodwise-bench-"));
  const remove = (): void => rmSync(folder, { recursive: true, force: true });
  const file = join(folder, "program.c");
  const program = join(folder, "program");
  writeFileSync(file, source);
  try {
    execFileSync("gcc", ["-O2", "-ffp-contract=off", "-o", program, file, "-lm"], { stdio: "pipe" });
  } catch (cause) {
    remove();
    if ((cause as NodeJS.ErrnoException).code === "ENOENT") return undefined;
    throw cause;
  }
  const run = (args: readonly string[]): number[] =>
    execFileSync(program, args, { encoding: "utf8" }).trim().split(/\s+/).map(Number);
  return { run, remove };
}

/** The least of several timings of `work`, in microseconds a call. */
export function leastMicroseconds(work: () => void, calls: number, rounds = 7): number {
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < rounds; round++) {
    const from = performance.now();
    for (let call = 0; call < calls; call++) work();
    least = Math.min(least, ((performance.now() - from) * 1000) / calls);
  }
  return least;
}
