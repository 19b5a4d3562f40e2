import { spawn } from "node:child_process";

/** What became of a program. */
export interface Ended {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** Runs a program to its end without holding up the test runner, which must hear from its tests meanwhile. */
export function ran(
  program: string,
  words: readonly string[],
  options: { readonly cwd?: string; readonly env?: NodeJS.ProcessEnv; readonly input?: string } = {},
): Promise<Ended> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, words, { cwd: options.cwd, env: options.env ?? process.env });
    const told = { stdout: "", stderr: "" };
    for (const name of ["stdout", "stderr"] as const) {
      child[name].on("data", (chunk: Buffer) => {
        told[name] += chunk.toString();
      });
    }
    child.once("error", reject);
    child.once("close", (status) => resolve({ status, ...told }));
    child.stdin.end(options.input ?? "");
  });
}
