import { createRequire } from "node:module";
import { dirname, join, parse, relative } from "node:path";
import type ts from "typescript-cell";
import type { BundledPackage } from "./installation.js";
import { languageLibraryName } from "./language-library.js";

/** Compiler options of cells: strict, with packages resolved as Node resolves them. */
export function cellOptions(library: typeof ts, packages: readonly BundledPackage[]): ts.CompilerOptions {
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
 * Where the compiler finds the bundled packages, and by what name it writes their types into declarations. A name by
 * path would fail, since the compiler rejects paths into the node_modules of another folder.
 */
function packagePaths(packages: readonly BundledPackage[]): ts.CompilerOptions {
  const pathsBasePath = parse(__dirname).root.replaceAll("\\", "/");
  const fromRoot = (path: string): string => relative(pathsBasePath, path).replaceAll("\\", "/");
  // The first match wins: a package nested in another package's folder goes first.
  const innerFirst = [...packages].sort((one, other) => other.folder.length - one.folder.length);
  const entries = innerFirst.flatMap(({ name, types, folder }) => [
    [name, [fromRoot(types)]],
    [`${name}/*`, [fromRoot(join(folder, "*"))]],
  ]);
  return { pathsBasePath, paths: Object.fromEntries(entries) };
}
