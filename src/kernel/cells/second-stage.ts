import type ts from "typescript-cell";
import { loopChecks } from "./loop-checks.js";
import { type PlaceFinder, placeFinder, splitInlineMap } from "./source-places.js";
import { topLevelYields } from "./top-level-yields.js";

/** The second stage of compilation, to CommonJS. */
export interface SecondStage {
  readonly transpile: (code: string, options: ts.TranspileOptions) => ts.TranspileOutput;
  /** How places in what it made lead back through both stages to the source; told once. */
  readonly finderOf: (code: string) => PlaceFinder | undefined;
}

/** Adds loop checks and keeps the maps of both stages. */
export function secondStage(library: typeof ts): SecondStage {
  const finders = new Map<string, PlaceFinder>();
  const transformers = { before: [topLevelYields(library), loopChecks(library)] };
  return {
    transpile: (code, options) => {
      const first = splitInlineMap(code);
      const compilerOptions = { ...options.compilerOptions, sourceMap: true };
      const done = library.transpileModule(first.code, { ...options, compilerOptions, transformers });
      const outputText = done.outputText.replace(/\n?\/\/# sourceMappingURL=.*\s*$/, "");
      finders.set(
        outputText,
        placeFinder([done.sourceMapText, first.map].filter((map) => map !== undefined)),
      );
      return { ...done, outputText };
    },
    finderOf: (code) => {
      const found = finders.get(code);
      finders.delete(code);
      return found;
    },
  };
}
