import Module from "node:module";
import { basename } from "node:path";
import type { BundledPackage } from "./installation.js";

interface ModuleInternals {
  _resolveFilename(request: string, ...rest: unknown[]): string;
  _load(request: string, parent: { filename?: string | null } | undefined, ...rest: unknown[]): unknown;
}

/** Modules loaded before a cell runs, by the name under which cells import them. */
export type Preloaded = Map<string, unknown>;

/**
 * Lets every `require` in this process find the bundled packages by name, and lets cells and the files beside the
 * notebook find the preloaded modules.
 */
export function installBundledModules(
  folder: string,
  packages: readonly BundledPackage[],
  preloaded: Preloaded,
): void {
  // Node has no public interface for this; both functions have had the same signature since Node 4.
  const internals = Module as unknown as ModuleInternals;
  const resolve = internals._resolveFilename;
  const load = internals._load;
  const programs = new Map(packages.map(({ name, program }) => [name, program]));
  internals._resolveFilename = function (request, ...rest) {
    return programs.get(request) ?? resolve.call(this, request, ...rest);
  };
  internals._load = function (request, parent, ...rest) {
    if (preloaded.has(request) && isBesideNotebook(folder, parent?.filename)) return preloaded.get(request);
    return load.call(this, request, parent, ...rest);
  };
}

function isBesideNotebook(folder: string, filename: string | null | undefined): boolean {
  if (!filename?.startsWith(folder)) return false;
  return !filename.slice(folder.length).includes("node_modules") && basename(filename) !== "node_modules";
}
