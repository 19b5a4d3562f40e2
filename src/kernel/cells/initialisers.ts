import { createRequire } from "node:module";
import type ts from "typescript-cell";

/** A top-level `const name = value` or `let name = value` of a cell, with the position of its value. */
export interface Initialiser {
  readonly name: string;
  readonly start: number;
  readonly end: number;
}

/** Finds the top-level values of a cell that can be replaced. Positions are UTF-16 units. */
export function initialisers(text: string): readonly Initialiser[] {
  const load = createRequire(__filename);
  const converter = load.resolve("tslab/package.json");
  const path = load.resolve("@tslab/typescript-for-tslab", { paths: [converter] });
  const library = load(path) as typeof ts;
  const file = library.createSourceFile("cell.ts", text, library.ScriptTarget.ES2022);
  return file.statements
    .filter(library.isVariableStatement)
    .flatMap((statement) => [...statement.declarationList.declarations])
    .flatMap(({ name, initializer }) =>
      library.isIdentifier(name) && initializer !== undefined
        ? [{ name: name.text, start: initializer.getStart(file), end: initializer.end }]
        : [],
    );
}
