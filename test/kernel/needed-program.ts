import { spawnSync } from "node:child_process";

/**
 * Whether tests that drive a program from outside the project can run. In CI they must: a missing program is an
 * error there, elsewhere a visible skip.
 */
export function isThere(program: string, ...check: readonly string[]): boolean {
  const found = spawnSync(program, check, { stdio: "ignore" }).status === 0;
  if (!found && process.env["CI"]) throw new Error(`${program} ${check.join(" ")} failed; CI must have it.`);
  return found;
}
