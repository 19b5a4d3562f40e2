import { mkdirSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { basename, dirname, join } from "node:path";

/** Writes a file whole or not at all: what was there stays until the new text is complete beside it. */
export function writeWhole(path: string, text: string): void {
  mkdirSync(dirname(path), { recursive: true });
  const beside = join(dirname(path), `.${basename(path)}.${process.pid}`);
  try {
    writeFileSync(beside, text);
    renameSync(beside, path);
  } catch (cause) {
    rmSync(beside, { force: true });
    throw cause;
  }
}
