import { createRequire } from "node:module";
import { join } from "node:path";
import type ts from "typescript-cell";
import { cellBuilder } from "./cell-builder.js";
import { cellOptions } from "./cell-options.js";
import { type CellResolution, cellResolution } from "./cell-resolution.js";
import { type CommonJsStage, commonJsStage } from "./commonjs-stage.js";
import { compilerLibrary, compilerPath } from "./compiler-library.js";
import { declarationTexts } from "./declaration-texts.js";
import { exportedText } from "./exported-text.js";
import type { BundledPackage } from "./installation.js";
import { withHints } from "./type-hints.js";
import { type WatchedFiles, watchedFiles } from "./watched-files.js";

/** The compiler as the cell converter gets it, with handles on what was changed. */
export interface CellTypescript {
  readonly library: typeof ts;
  readonly files: WatchedFiles;
  readonly resolution: CellResolution;
  readonly mapperOf: CommonJsStage["mapperOf"];
  /** Makes all of Node's declarations available to cells. */
  readonly addNodeTypes: () => void;
  /** Adds the docstrings to the declarations of the language and of this package. */
  readonly addDocs: () => void;
  /** Does work on a cell that will be run, not only inspected. */
  readonly compiling: <T>(work: () => T) => T;
  /** Saves the compiler cache for the next start. */
  readonly saveCache: () => void;
}

/**
 * Loads the compiler and replaces it by an altered copy before the converter is loaded, because the compiler's exports
 * are getters and cannot be assigned.
 */
export function cellTypescript(folder: string, packages: readonly BundledPackage[]): CellTypescript {
  const { library, saveCache } = compilerLibrary();
  const files = watchedFiles(library, folder);
  const resolution = cellResolution(library, folder, library.sys);
  const stage = commonJsStage(library);
  const texts = declarationTexts(folder);
  const exported = exportedText(library);
  const cellFile = join(folder, "__tslab__.ts").replaceAll("\\", "/");
  let compiles = false;

  const altered = {
    ...library,
    sys: {
      ...library.sys,
      watchFile: files.watchFile,
      watchDirectory: () => ({ close: () => undefined }),
      readFile: (path: string, encoding?: string) => texts.read(path) ?? library.sys.readFile(path, encoding),
      fileExists: (path: string) => texts.isVirtual(path) || library.sys.fileExists(path),
    },
    createWatchCompilerHost: (
      roots: string[],
      given: ts.CompilerOptions,
      sys: ts.System,
      ...rest: unknown[]
    ) => {
      const options = { ...given, ...cellOptions(library, packages) };
      const [, ...reporters] = rest;
      const host = library.createWatchCompilerHost(
        [...roots, texts.globalsFile],
        options,
        sys,
        cellBuilder(library),
        ...(reporters as [ts.DiagnosticReporter, ts.WatchStatusReporter]),
      );
      const readFile = host.readFile;
      host.readFile = (path, encoding) => {
        const text = readFile(path, encoding);
        return compiles && path === cellFile && text !== undefined ? exported.of(text) : text;
      };
      host.resolveModuleNames = (names, from) => resolution.resolve(names, from, options);
      host.hasInvalidatedResolutions = resolution.isInvalidated;
      return host;
    },
    transpileModule: stage.transpile,
    // The converter's compiler has this function, although it does not declare it.
    getPreEmitDiagnosticsOfFiles: (program: ts.Program, given: readonly ts.SourceFile[]) => {
      const diagnose = Reflect.get(library, "getPreEmitDiagnosticsOfFiles") as PreEmitDiagnostics;
      return withHints(library, program, diagnose(program, given));
    },
  };
  // The converter finds this module when it looks for the compiler.
  const load = createRequire(__filename);
  load.cache[compilerPath] = { exports: altered, loaded: true } as NodeJS.Module;
  return {
    library,
    files,
    resolution,
    mapperOf: stage.mapperOf,
    addNodeTypes: () => {
      for (const path of texts.addNodeTypes()) files.report(path);
    },
    addDocs: () => {
      for (const path of texts.addDocs()) files.report(path);
    },
    compiling: (work) => {
      compiles = true;
      try {
        return work();
      } finally {
        compiles = false;
      }
    },
    saveCache,
  };
}

type PreEmitDiagnostics = (program: ts.Program, files: readonly ts.SourceFile[]) => readonly ts.Diagnostic[];
