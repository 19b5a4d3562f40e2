import { mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import Module, { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { setFlagsFromString } from "node:v8";
import { Script } from "node:vm";
import type ts from "typescript-cell";
import { cacheFolder } from "./cache-folder.js";

const load = createRequire(__filename);
const converterPackage = dirname(load.resolve("tslab/package.json"));

/** Path of the compiler that the cell converter uses. */
export const compilerPath: string = load.resolve("@tslab/typescript-for-tslab", {
  paths: [converterPackage],
});

const heapSetting = "--heap-growing-percent=20";

/** The compiler, and a function that saves its compiled code for the next start. */
export interface CompilerLibrary {
  readonly library: typeof ts;
  readonly saveCache: () => void;
}

/**
 * Loads the compiler, from cached code if an earlier start saved it: the text has eight megabytes, and compiling it is
 * a third of the time to the first cell.
 */
export function compilerLibrary(): CompilerLibrary {
  // Every cell leaves a whole compiler program behind, and by default Node lets the heap double before a full garbage
  // collection. Set before the code is read, because cached code is bound to Node's settings.
  setFlagsFromString(heapSetting);
  // Characters beyond ASCII occur only in comments (a test checks), and latin1 takes half the memory.
  const text = readFileSync(compilerPath, "latin1");
  const settings = [process.version, process.arch, ...process.execArgv, heapSetting]
    .join("")
    .replace(/\W+/g, "-");
  const cacheFile = join(cacheFolder(), `compiler-${settings}-${text.length}.bin`);
  const cachedData = read(cacheFile);
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
  return {
    library: module.exports as typeof ts,
    saveCache: () => void (isFresh || write(cacheFile, script)),
  };
}

function read(path: string): Buffer | undefined {
  try {
    return readFileSync(path);
  } catch {
    return undefined;
  }
}

/** Without a cache the next start is slower; nothing else is lost. */
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
