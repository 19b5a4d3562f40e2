import { dirname, resolve } from "node:path";
import type { CompiledModule } from "./cell-compiler.js";

/**
 * The files beside the notebook that must run again: those that were compiled again, and those that import one of them
 * and would keep its old exports.
 */
export interface ChangedModules {
  readonly withDependents: (compiled: readonly CompiledModule[]) => readonly CompiledModule[];
}

const relativeImport = /\brequire\("(\.[^"\n]*)"\)/g;

export function changedModules(): ChangedModules {
  const known = new Map<string, CompiledModule>();
  return {
    withDependents: (compiled) => {
      for (const module of compiled) known.set(module.path, module);
      const again = new Set(compiled.map(({ path }) => path));
      for (let before = -1; before !== again.size; ) {
        before = again.size;
        for (const module of known.values()) {
          if (importsOf(module).some((path) => again.has(path))) again.add(module.path);
        }
      }
      return [...known.values()].filter(({ path }) => again.has(path));
    },
  };
}

function importsOf({ path, code }: CompiledModule): readonly string[] {
  const names = [...code.matchAll(relativeImport)].map(([, name = ""]) => resolve(dirname(path), name));
  return names.map((name) => (name.endsWith(".js") ? name : `${name}.js`));
}
