import { createRequire, isBuiltin } from "node:module";
import { join } from "node:path";
import vm from "node:vm";
import type { Preloaded } from "./bundled-modules.js";

/** Loads, before a cell runs, the packages that only `import` can load. */
export type Preload = (codes: readonly string[]) => Promise<void>;

const requires = /\brequire\(("(?:[^"\\\n]|\\.)*")\)/g;

export function modulePreloader(folder: string, preloaded: Preloaded): Preload {
  const require = createRequire(join(folder, "cell.js"));
  // A script with a file name in the notebook's folder resolves imports as a file there would.
  const importFrom = new vm.Script("(name) => import(name)", {
    filename: join(folder, "cell.js"),
    importModuleDynamically: vm.constants.USE_MAIN_CONTEXT_DEFAULT_LOADER,
  }).runInThisContext() as (name: string) => Promise<object>;
  return async (codes) => {
    for (const name of importedNames(codes)) {
      if (preloaded.has(name) || isBuiltin(name) || !needsImport(require, name)) continue;
      preloaded.set(name, asRequired(await importFrom(name)));
    }
  };
}

function importedNames(codes: readonly string[]): ReadonlySet<string> {
  const found = codes.flatMap((code) => [...code.matchAll(requires)].map((match) => match[1] ?? '""'));
  const names = found.map((literal) => JSON.parse(literal) as string);
  return new Set(names.filter((name) => !name.startsWith(".") && !name.startsWith("/")));
}

/** Whether `require` would reject the package or find only an ES module. */
function needsImport(require: NodeJS.Require, name: string): boolean {
  try {
    return require.resolve(name).endsWith(".mjs");
  } catch (cause) {
    return (cause as NodeJS.ErrnoException).code === "ERR_PACKAGE_PATH_NOT_EXPORTED";
  }
}

/** An ES module in the form that compiled code expects from `require`. */
function asRequired(module: object): object {
  const required: object = Object.defineProperty({}, "__esModule", { value: true });
  for (const name of Object.keys(module)) {
    Object.defineProperty(required, name, { enumerable: true, get: () => Reflect.get(module, name) });
  }
  return required;
}
