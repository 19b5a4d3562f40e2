import type ts from "typescript-cell";

/**
 * Adds to a cell's text the export of everything it declares, as the converter would in a second pass over the
 * program. Done while the text is read, it saves that pass.
 */
export interface ExportedText {
  readonly of: (text: string) => string;
}

export function exportedText(library: typeof ts): ExportedText {
  const bind = Reflect.get(library, "bindSourceFile") as (file: ts.SourceFile, options: object) => void;
  let last = "";
  return {
    of: (text) => {
      // In the second pass of the converter the export is already there.
      if (text === last) return text;
      const file = library.createSourceFile("cell.ts", text, library.ScriptTarget.ES2022, true);
      bind(file, {});
      const locals = (Reflect.get(file, "locals") ?? new Map()) as ReadonlyMap<string, unknown>;
      const names = [...locals.keys()];
      last = names.length > 0 ? `${text}\nexport {${names.join(", ")}}` : text;
      return last;
    },
  };
}
