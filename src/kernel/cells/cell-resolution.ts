import type ts from "typescript-cell";

/** How imports in cells find their declarations, with a memory that can be emptied when files come or go. */
export interface CellResolution {
  readonly resolve: (
    names: readonly string[],
    from: string,
    options: ts.CompilerOptions,
  ) => (ts.ResolvedModuleFull | undefined)[];
  readonly forget: () => void;
  /** Whether what was found earlier must be looked up again; asked by the compiler for every file. */
  readonly isForgotten: () => boolean;
  /** Called when the compiler has looked everything up. */
  readonly remembered: () => void;
}

export function cellResolution(
  library: typeof ts,
  folder: string,
  host: ts.ModuleResolutionHost,
): CellResolution {
  let memory: ts.ModuleResolutionCache | undefined;
  let forgotten = false;
  return {
    resolve: (names, from, options) => {
      memory ??= library.createModuleResolutionCache(folder, (name) => name, options);
      const known = memory;
      return names.map((name) => library.resolveModuleName(name, from, options, host, known).resolvedModule);
    },
    forget: () => {
      memory = undefined;
      forgotten = true;
    },
    isForgotten: () => forgotten,
    remembered: () => {
      forgotten = false;
    },
  };
}
