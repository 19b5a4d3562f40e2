import { createRequire } from "node:module";
import type { Converter, Diagnostic } from "tslab/dist/converter";
import type ts from "typescript-cell";
import { type CellDiagnostic, CellError } from "./cell-error.js";
import { type CellTypescript, cellTypescript } from "./cell-typescript.js";
import type { BundledPackage } from "./installation.js";
import { needsNodeTypes } from "./node-types.js";
import type { PositionMapper } from "./source-positions.js";
import { hasTopLevelForAwait } from "./top-level-for-await.js";

const load = createRequire(__filename);

/** A compiled cell. */
export interface CompiledCell {
  readonly code: string;
  /** Declarations of the names that later cells can use. */
  readonly declarations: string;
  readonly usesAwait: boolean;
  /** Whether its awaits were turned into yields. */
  readonly yields: boolean;
  /** The export that holds the value of the cell's last expression. */
  readonly lastValue: string | undefined;
  readonly mapPosition: PositionMapper | undefined;
  /** Files beside the notebook that were compiled again. */
  readonly modules: readonly CompiledModule[];
}

export interface CompiledModule {
  readonly path: string;
  readonly code: string;
  readonly mapPosition: PositionMapper | undefined;
}

export interface CellCompiler {
  readonly library: typeof ts;
  /** @throws {CellError} when the text does not compile. */
  readonly compile: (declarations: string, text: string) => CompiledCell;
  readonly complete: Converter["complete"];
  readonly inspect: Converter["inspect"];
  /** Saves the compiler cache, which makes the next start faster; called in idle time. */
  readonly saveCache: () => void;
}

/** Builds the compiler for the cells of a notebook in `folder`. Takes about half a second, once. */
export function cellCompiler(folder: string, packages: readonly BundledPackage[]): CellCompiler {
  const typescript = cellTypescript(folder, packages);
  const { createConverter } = load("tslab/dist/converter") as typeof import("tslab/dist/converter");
  const converter = createConverter();
  const prepare = (text: string): void => {
    if (typescript.files.refresh()) typescript.resolution.invalidate();
    if (needsNodeTypes(text)) typescript.addNodeTypes();
  };
  return {
    library: typescript.library,
    saveCache: typescript.saveCache,
    compile: (declarations, text) => {
      prepare(text);
      const converted = typescript.compiling(() =>
        withoutWarnings(() => converter.convert(declarations, text)),
      );
      typescript.resolution.validated();
      return compiledCell(typescript, text, converted);
    },
    complete: (declarations, text, position) => {
      prepare(text);
      return converter.complete(declarations, text, position);
    },
    inspect: (declarations, text, position) => {
      typescript.addDocs();
      prepare(text);
      return converter.inspect(declarations, text, position);
    },
  };
}

/** The converter warns when its second pass finds nothing to do, which is intended here. */
function withoutWarnings<T>(work: () => T): T {
  const { warn } = console;
  console.warn = () => undefined;
  try {
    return work();
  } finally {
    console.warn = warn;
  }
}

function compiledCell(
  typescript: CellTypescript,
  text: string,
  converted: ReturnType<Converter["convert"]>,
): CompiledCell {
  if (converted.diagnostics.length > 0) throw new CellError(converted.diagnostics.map(cellDiagnostic));
  const code = converted.output ?? "";
  const loopsOverWaits = hasTopLevelForAwait(typescript.library, text);
  return {
    code,
    declarations: converted.declOutput ?? "",
    usesAwait: converted.hasToplevelAwait === true || loopsOverWaits,
    yields: converted.hasToplevelAwait === true && !loopsOverWaits,
    lastValue: converted.lastExpressionVar,
    mapPosition: positionInCell(typescript.mapperOf(code), code.split("\n").length),
    modules: (converted.sideOutputs ?? []).map(({ path, data }) => ({
      path,
      code: data,
      mapPosition: typescript.mapperOf(data),
    })),
  };
}

/** The converter puts one line before the text of a cell, and more lines after its code. */
function positionInCell(find: PositionMapper | undefined, codeLines: number): PositionMapper | undefined {
  if (find === undefined) return undefined;
  return (generated) => {
    const position = generated.line <= codeLines ? find(generated) : undefined;
    return position && position.line > 1 ? { line: position.line - 1, column: position.column } : undefined;
  };
}

const firstNonSyntaxCode = 2000;

function cellDiagnostic({ messageText, code, start, end, fileName }: Diagnostic): CellDiagnostic {
  return {
    text: messageText,
    isSyntax: code < firstNonSyntaxCode,
    start: { line: start.line + 1, column: start.character + 1 },
    end: { line: end.line + 1, column: end.character + 1 },
    ...(fileName === undefined ? {} : { file: fileName }),
  };
}
