import type ts from "typescript-cell";

/** Whether a cell has a `for await` outside any function, which the converter does not detect. */
export function hasTopLevelForAwait(library: typeof ts, text: string): boolean {
  if (!/\bfor\s+await\b/.test(text)) return false;
  const file = library.createSourceFile("cell.ts", text, library.ScriptTarget.ES2022);
  const containsForAwait = (node: ts.Node): boolean => {
    if (library.isFunctionLike(node) || library.isClassLike(node)) return false;
    if (library.isForOfStatement(node) && node.awaitModifier !== undefined) return true;
    return library.forEachChild(node, containsForAwait) === true;
  };
  return containsForAwait(file);
}
