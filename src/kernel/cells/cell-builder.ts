import type ts from "typescript-cell";

/**
 * What the converter asks of a builder, over a plain program. The compiler's own builder works out who is
 * affected by a change, which a single cell does not need.
 */
export function cellBuilder(library: typeof ts): ts.CreateProgram<ts.BuilderProgram> {
  return (...given) => {
    const builder = Reflect.apply(library.createAbstractBuilder, undefined, given) as ts.BuilderProgram;
    // The converter looks at scopes and parents, which are there once the checker has bound the files.
    builder.getProgram().getTypeChecker();
    return { ...builder, getAllDependencies: (file) => sourcesReachedFrom(builder.getProgram(), file) };
  };
}

/** A file and the sources it imports, directly or not. Declarations are not followed: nothing is run of them. */
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

/** The compiler keeps on each file what its imports mean; its declarations leave that out. */
function importedPaths(file: ts.SourceFile): readonly string[] {
  const paths: string[] = [];
  const modules = Reflect.get(file, "resolvedModules") as ResolvedModules | undefined;
  modules?.forEach((resolved) => {
    const module = resolved?.resolvedModule ?? (resolved as ts.ResolvedModuleFull | undefined);
    if (module?.resolvedFileName) paths.push(module.resolvedFileName);
  });
  return paths;
}
