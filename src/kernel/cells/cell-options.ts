import { createRequire } from "node:module";
import { dirname, join, parse, relative } from "node:path";
import type ts from "typescript-cell";
import type { OwnPackage } from "./installation.js";
import { languageLibraryName } from "./language-library.js";

/** How cells are checked: strictly, and with packages resolved as Node itself resolves them. */
export function cellOptions(library: typeof ts, packages: readonly OwnPackage[]): ts.CompilerOptions {
  const load = createRequire(__filename);
  const converterPackage = dirname(load.resolve("tslab/package.json"));
  const nodeTypes = load.resolve("@types/node/package.json", { paths: [converterPackage] });
  return {
    strict: true,
    checkJs: false,
    moduleResolution: library.ModuleResolutionKind.Bundler,
    customConditions: ["node"],
    ...packagePaths(packages),
    lib: [languageLibraryName],
    types: [],
    typeRoots: [dirname(dirname(nodeTypes))],
    inlineSourceMap: true,
  };
}

/**
 * Where the compiler finds the kernel's own packages, and by what name it writes their types into declarations:
 * a name by path would not do, since the compiler refuses one that leads through another folder's packages.
 */
function packagePaths(packages: readonly OwnPackage[]): ts.CompilerOptions {
  const pathsBasePath = parse(__dirname).root.replaceAll("\\", "/");
  const fromRoot = (path: string): string => relative(pathsBasePath, path).replaceAll("\\", "/");
  // The first that fits names a file: the package inside another's folder goes before that other.
  const innerFirst = [...packages].sort((one, other) => other.folder.length - one.folder.length);
  const entries = innerFirst.flatMap(({ name, types, folder }) => [
    [name, [fromRoot(types)]],
    [`${name}/*`, [fromRoot(join(folder, "*"))]],
  ]);
  return { pathsBasePath, paths: Object.fromEntries(entries) };
}
