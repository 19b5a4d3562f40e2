import { mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import Module, { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { setFlagsFromString } from "node:v8";
import { Script } from "node:vm";
import type ts from "typescript-cell";
import { cacheFolder } from "./cache-folder.js";

const load = createRequire(__filename);
const converterPackage = dirname(load.resolve("tslab/package.json"));

/** Where the compiler that the cell converter uses lies. */
export const compilerPath: string = load.resolve("@tslab/typescript-for-tslab", {
  paths: [converterPackage],
});

const heapSetting = "--heap-growing-percent=20";

/** The compiler, and how to keep what Node made of its text for the next start. */
export interface CompilerLibrary {
  readonly library: typeof ts;
  readonly keep: () => void;
}

/**
 * Loads the compiler from its text and, if an earlier start kept it, from the code that Node made of that text:
 * it is eight megabytes, and reading them anew is a third of the time until the first cell can run.
 */
export function compilerLibrary(): CompilerLibrary {
  // Every cell leaves a whole program of the compiler behind. By itself Node would let the heap double before it
  // tidies up old things. Set before the code is read, because kept code is bound to Node's settings.
  setFlagsFromString(heapSetting);
  // Beyond ASCII it has characters only in comments (a test looks), and read so it takes half the memory.
  const text = readFileSync(compilerPath, "latin1");
  const settings = [process.version, process.arch, ...process.execArgv, heapSetting]
    .join("")
    .replace(/\W+/g, "-");
  const kept = join(cacheFolder(), `compiler-${settings}-${text.length}.bin`);
  const cachedData = read(kept);
  const script = new Script(Module.wrap(text), {
    filename: compilerPath,
    ...(cachedData ? { cachedData } : {}),
  });
  const module = new Module(compilerPath);
  module.filename = compilerPath;
  module.loaded = true;
  const run = script.runInThisContext() as (...names: readonly unknown[]) => void;
  run(module.exports, createRequire(compilerPath), module, compilerPath, dirname(compilerPath));
  const isFresh = cachedData !== undefined && script.cachedDataRejected !== true;
  return { library: module.exports as typeof ts, keep: () => void (isFresh || write(kept, script)) };
}

function read(path: string): Buffer | undefined {
  try {
    return readFileSync(path);
  } catch {
    return undefined;
  }
}

/** A cache that cannot be written costs time at the next start and nothing else. */
function write(path: string, script: Script): void {
  try {
    mkdirSync(dirname(path), { recursive: true });
    const beside = `${path}.${process.pid}`;
    writeFileSync(beside, script.createCachedData());
    renameSync(beside, path);
  } catch {
    return;
  }
}
