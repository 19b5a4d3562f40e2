import type ts from "typescript-cell";

/**
 * The builder interface that the converter uses, over a plain program. The compiler's own builder tracks which files a
 * change affects, which a single cell does not need.
 */
export function cellBuilder(library: typeof ts): ts.CreateProgram<ts.BuilderProgram> {
  return (...given) => {
    const builder = Reflect.apply(library.createAbstractBuilder, undefined, given) as ts.BuilderProgram;
    // The converter reads scopes and parents, which exist once the checker has bound the files.
    builder.getProgram().getTypeChecker();
    return { ...builder, getAllDependencies: (file) => sourcesReachedFrom(builder.getProgram(), file) };
  };
}

/** A file and the sources it imports, directly or not. Declarations are skipped: they are not run. */
function sourcesReachedFrom(program: ts.Program, from: ts.SourceFile): string[] {
  const reached = new Set<ts.SourceFile>([from]);
  for (const file of reached) {
    for (const path of importedPaths(file)) {
      const imported = program.getSourceFile(path);
      if (imported !== undefined && !imported.isDeclarationFile) reached.add(imported);
    }
  }
  return [...reached].map(({ fileName }) => fileName);
}

interface ResolvedModules {
  forEach(visit: (resolved: { readonly resolvedModule?: ts.ResolvedModuleFull } | undefined) => void): void;
}

/** The compiler stores the resolved imports on each file, in a field that its declarations omit. */
function importedPaths(file: ts.SourceFile): readonly string[] {
  const paths: string[] = [];
  const modules = Reflect.get(file, "resolvedModules") as ResolvedModules | undefined;
  modules?.forEach((resolved) => {
    const module = resolved?.resolvedModule ?? (resolved as ts.ResolvedModuleFull | undefined);
    if (module?.resolvedFileName) paths.push(module.resolvedFileName);
  });
  return paths;
}
