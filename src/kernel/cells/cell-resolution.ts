import type ts from "typescript-cell";

/** Resolves imports of cells to declarations, with a cache that is invalidated when files are added or removed. */
export interface CellResolution {
  readonly resolve: (
    names: readonly string[],
    from: string,
    options: ts.CompilerOptions,
  ) => (ts.ResolvedModuleFull | undefined)[];
  readonly invalidate: () => void;
  /** Whether earlier results must be looked up again; the compiler asks for every file. */
  readonly isInvalidated: () => boolean;
  /** Called when the compiler has resolved everything. */
  readonly validated: () => void;
}

export function cellResolution(
  library: typeof ts,
  folder: string,
  host: ts.ModuleResolutionHost,
): CellResolution {
  let cache: ts.ModuleResolutionCache | undefined;
  let invalidated = false;
  return {
    resolve: (names, from, options) => {
      cache ??= library.createModuleResolutionCache(folder, (name) => name, options);
      const known = cache;
      return names.map((name) => library.resolveModuleName(name, from, options, host, known).resolvedModule);
    },
    invalidate: () => {
      cache = undefined;
      invalidated = true;
    },
    isInvalidated: () => invalidated,
    validated: () => {
      invalidated = false;
    },
  };
}
