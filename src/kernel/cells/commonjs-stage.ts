import type ts from "typescript-cell";
import { interruptChecks } from "./interrupt-checks.js";
import { type PositionMapper, positionMapper, splitInlineMap } from "./source-positions.js";
import { topLevelYields } from "./top-level-yields.js";

/** The second stage of compilation, to CommonJS. */
export interface CommonJsStage {
  readonly transpile: (code: string, options: ts.TranspileOptions) => ts.TranspileOutput;
  /** Maps positions in its output back to the source; each map is returned once. */
  readonly mapperOf: (code: string) => PositionMapper | undefined;
}

/** Adds interrupt checks and stores the source maps of both stages. */
export function commonJsStage(library: typeof ts): CommonJsStage {
  const mappers = new Map<string, PositionMapper>();
  const transformers = { before: [topLevelYields(library), interruptChecks(library)] };
  return {
    transpile: (code, options) => {
      const first = splitInlineMap(code);
      const compilerOptions = { ...options.compilerOptions, sourceMap: true };
      const done = library.transpileModule(first.code, { ...options, compilerOptions, transformers });
      const outputText = done.outputText.replace(/\n?\/\/# sourceMappingURL=.*\s*$/, "");
      mappers.set(
        outputText,
        positionMapper([done.sourceMapText, first.map].filter((map) => map !== undefined)),
      );
      return { ...done, outputText };
    },
    mapperOf: (code) => {
      const found = mappers.get(code);
      mappers.delete(code);
      return found;
    },
  };
}
