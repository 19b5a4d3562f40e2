import { createRequire } from "node:module";
import { dirname, join, parse, relative } from "node:path";
import type ts from "typescript-cell";
import { cellGlobals, smallNodeGlobals } from "./cell-globals.js";
import { type CellResolution, cellResolution } from "./cell-resolution.js";
import type { OwnPackage } from "./installation.js";
import { loopChecks } from "./loop-checks.js";
import { type PlaceFinder, placeFinder, splitInlineMap } from "./source-places.js";
import { type WatchedFiles, watchedFiles } from "./watched-files.js";

const load = createRequire(__filename);
const converterPackage = dirname(load.resolve("tslab/package.json"));
const libraryPath = load.resolve("@tslab/typescript-for-tslab", { paths: [converterPackage] });

/** The compiler as the cell converter gets it, and the doors to what we changed about it. */
export interface CellTypescript {
  readonly library: typeof ts;
  readonly files: WatchedFiles;
  readonly resolution: CellResolution;
  /** From now on cells may name everything that Node declares. */
  readonly addNodeTypes: () => void;
  /** How places in this generated code lead back to its source; told once. */
  readonly finderOf: (code: string) => PlaceFinder | undefined;
}

/**
 * Loads the compiler and puts an altered copy in its place before the converter is loaded, because the
 * compiler's exports are getters and assigning to them does nothing.
 */
export function cellTypescript(folder: string, packages: readonly OwnPackage[]): CellTypescript {
  const real = load(libraryPath) as typeof ts;
  const files = watchedFiles(real, folder);
  const resolution = cellResolution(real, folder, real.sys);
  const globalsFile = join(folder, "__globals__.d.ts").replaceAll("\\", "/");
  let nodeTypes = false;
  const globals = (): string =>
    cellGlobals + (nodeTypes ? '\n/// <reference types="node" />\n' : smallNodeGlobals);
  const finders = new Map<string, PlaceFinder>();

  const altered = {
    ...real,
    sys: {
      ...real.sys,
      watchFile: files.watchFile,
      watchDirectory: () => ({ close: () => undefined }),
      readFile: (path: string, encoding?: string) =>
        path === globalsFile ? globals() : real.sys.readFile(path, encoding),
      fileExists: (path: string) => path === globalsFile || real.sys.fileExists(path),
    },
    createWatchCompilerHost: (roots: string[], given: ts.CompilerOptions, ...rest: unknown[]) => {
      const options = { ...given, ...cellOptions(real, packages) };
      const host: ts.WatchCompilerHost<ts.BuilderProgram> = Reflect.apply(
        real.createWatchCompilerHost,
        undefined,
        [[...roots, globalsFile], options, ...rest],
      );
      host.resolveModuleNames = (names, from) => resolution.resolve(names, from, options);
      host.hasInvalidatedResolutions = resolution.isForgotten;
      return host;
    },
    transpileModule: (code: string, options: ts.TranspileOptions) => transpile(real, finders, code, options),
  };
  const module = load.cache[libraryPath];
  if (module) module.exports = altered;
  return {
    library: real,
    files,
    resolution,
    addNodeTypes: () => {
      if (nodeTypes) return;
      nodeTypes = true;
      files.report(globalsFile);
    },
    finderOf: (code) => {
      const found = finders.get(code);
      finders.delete(code);
      return found;
    },
  };
}

/** How cells are checked: strictly, and with packages resolved as Node itself resolves them. */
function cellOptions(library: typeof ts, packages: readonly OwnPackage[]): ts.CompilerOptions {
  return {
    strict: true,
    checkJs: false,
    moduleResolution: library.ModuleResolutionKind.Bundler,
    customConditions: ["node"],
    ...packagePaths(packages),
    types: [],
    typeRoots: [dirname(dirname(load.resolve("@types/node/package.json", { paths: [converterPackage] })))],
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

/** The second stage of compilation (to CommonJS), with loop checks, keeping the maps of both stages. */
function transpile(
  library: typeof ts,
  finders: Map<string, PlaceFinder>,
  code: string,
  options: ts.TranspileOptions,
): ts.TranspileOutput {
  const first = splitInlineMap(code);
  const compilerOptions = { ...options.compilerOptions, sourceMap: true };
  const transformers = { before: [loopChecks(library)] };
  const done = library.transpileModule(first.code, { ...options, compilerOptions, transformers });
  const outputText = done.outputText.replace(/\n?\/\/# sourceMappingURL=.*\s*$/, "");
  const maps = [done.sourceMapText, first.map].filter((map) => map !== undefined);
  finders.set(outputText, placeFinder(maps));
  return { ...done, outputText };
}
