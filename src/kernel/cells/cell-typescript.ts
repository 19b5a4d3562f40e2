import { createRequire } from "node:module";
import { join } from "node:path";
import type ts from "typescript-cell";
import { cellBuilder } from "./cell-builder.js";
import { cellOptions } from "./cell-options.js";
import { type CellResolution, cellResolution } from "./cell-resolution.js";
import { compilerLibrary, compilerPath } from "./compiler-library.js";
import { declarationTexts } from "./declaration-texts.js";
import { exportedText } from "./exported-text.js";
import type { OwnPackage } from "./installation.js";
import { type SecondStage, secondStage } from "./second-stage.js";
import { withHints } from "./type-hints.js";
import { type WatchedFiles, watchedFiles } from "./watched-files.js";

/** The compiler as the cell converter gets it, and the doors to what we changed about it. */
export interface CellTypescript {
  readonly library: typeof ts;
  readonly files: WatchedFiles;
  readonly resolution: CellResolution;
  readonly finderOf: SecondStage["finderOf"];
  /** From now on cells may name everything that Node declares. */
  readonly addNodeTypes: () => void;
  /** From now on the declarations of the language and of our package have their docstrings. */
  readonly addDocs: () => void;
  /** Does work on a cell that is to be run, not only looked at. */
  readonly compiling: <T>(work: () => T) => T;
  /** Keeps for the next start what makes it faster. */
  readonly keep: () => void;
}

/**
 * Loads the compiler and puts an altered copy in its place before the converter is loaded, because the
 * compiler's exports are getters and assigning to them does nothing.
 */
export function cellTypescript(folder: string, packages: readonly OwnPackage[]): CellTypescript {
  const { library, keep } = compilerLibrary();
  const files = watchedFiles(library, folder);
  const resolution = cellResolution(library, folder, library.sys);
  const stage = secondStage(library);
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
      host.hasInvalidatedResolutions = resolution.isForgotten;
      return host;
    },
    transpileModule: stage.transpile,
    // The converter's compiler has this function beyond those it declares.
    getPreEmitDiagnosticsOfFiles: (program: ts.Program, given: readonly ts.SourceFile[]) => {
      const complain = Reflect.get(library, "getPreEmitDiagnosticsOfFiles") as PreEmitDiagnostics;
      return withHints(library, program, complain(program, given));
    },
  };
  // The converter finds this module where it looks for the compiler.
  const load = createRequire(__filename);
  load.cache[compilerPath] = { exports: altered, loaded: true } as NodeJS.Module;
  return {
    library,
    files,
    resolution,
    finderOf: stage.finderOf,
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
    keep,
  };
}

type PreEmitDiagnostics = (program: ts.Program, files: readonly ts.SourceFile[]) => readonly ts.Diagnostic[];
