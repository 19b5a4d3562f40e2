import { createRequire } from "node:module";
import type { Converter, Diagnostic } from "tslab/dist/converter";
import type ts from "typescript-cell";
import { CellError, type Complaint } from "./cell-error.js";
import { type CellTypescript, cellTypescript } from "./cell-typescript.js";
import type { OwnPackage } from "./installation.js";
import { needsNodeTypes } from "./node-types.js";
import type { PlaceFinder } from "./source-places.js";
import { hasTopLevelForAwait } from "./top-level-for-await.js";

const load = createRequire(__filename);

/** A cell made ready to run. */
export interface CompiledCell {
  readonly code: string;
  /** What later cells may name, as declarations. */
  readonly declarations: string;
  readonly usesAwait: boolean;
  /** Whether its waits were turned into yields. */
  readonly yields: boolean;
  /** The export that holds the value of the cell's last expression. */
  readonly lastValue: string | undefined;
  readonly findPlace: PlaceFinder | undefined;
  /** Files beside the notebook, compiled anew. */
  readonly modules: readonly CompiledModule[];
}

export interface CompiledModule {
  readonly path: string;
  readonly code: string;
  readonly findPlace: PlaceFinder | undefined;
}

export interface CellCompiler {
  readonly library: typeof ts;
  /** @throws {CellError} when the text does not pass. */
  readonly compile: (declarations: string, text: string) => CompiledCell;
  readonly complete: Converter["complete"];
  readonly inspect: Converter["inspect"];
  /** Keeps for the next start what makes it faster; for idle time. */
  readonly keep: () => void;
}

/** Builds the compiler for cells whose notebook lies in `folder`. Takes about half a second, once. */
export function cellCompiler(folder: string, packages: readonly OwnPackage[]): CellCompiler {
  const typescript = cellTypescript(folder, packages);
  const { createConverter } = load("tslab/dist/converter") as typeof import("tslab/dist/converter");
  const converter = createConverter();
  const prepare = (text: string): void => {
    if (typescript.files.refresh()) typescript.resolution.forget();
    if (needsNodeTypes(text)) typescript.addNodeTypes();
  };
  return {
    library: typescript.library,
    keep: typescript.keep,
    compile: (declarations, text) => {
      prepare(text);
      const converted = typescript.compiling(() => quietly(() => converter.convert(declarations, text)));
      typescript.resolution.remembered();
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

/** The converter warns when its second pass over the program finds nothing to do, which is what we are after. */
function quietly<T>(work: () => T): T {
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
  if (converted.diagnostics.length > 0) throw new CellError(converted.diagnostics.map(complaint));
  const code = converted.output ?? "";
  const loopsOverWaits = hasTopLevelForAwait(typescript.library, text);
  return {
    code,
    declarations: converted.declOutput ?? "",
    usesAwait: converted.hasToplevelAwait === true || loopsOverWaits,
    yields: converted.hasToplevelAwait === true && !loopsOverWaits,
    lastValue: converted.lastExpressionVar,
    findPlace: ofCell(typescript.finderOf(code), code.split("\n").length),
    modules: (converted.sideOutputs ?? []).map(({ path, data }) => ({
      path,
      code: data,
      findPlace: typescript.finderOf(data),
    })),
  };
}

/** The converter puts one line of its own before the text of a cell, and what runs has more after the code. */
function ofCell(find: PlaceFinder | undefined, codeLines: number): PlaceFinder | undefined {
  if (find === undefined) return undefined;
  return (generated) => {
    const place = generated.line <= codeLines ? find(generated) : undefined;
    return place && place.line > 1 ? { line: place.line - 1, column: place.column } : undefined;
  };
}

const firstNonSyntaxCode = 2000;

function complaint({ messageText, code, start, end, fileName }: Diagnostic): Complaint {
  return {
    text: messageText,
    isSyntax: code < firstNonSyntaxCode,
    start: { line: start.line + 1, column: start.character + 1 },
    end: { line: end.line + 1, column: end.character + 1 },
    ...(fileName === undefined ? {} : { file: fileName }),
  };
}
