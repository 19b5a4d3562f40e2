import type ts from "typescript-cell";
import { hasTopLevelForAwait } from "./top-level-for-await.js";

/**
 * Turns the top-level awaits of a cell into yields, so that the cell can be run as a generator and stopped between any
 * two of them (see run-between-awaits.ts). A cell with `for await` is left unchanged.
 */
export function topLevelYields(library: typeof ts): ts.TransformerFactory<ts.SourceFile> {
  const { factory } = library;
  return (context) => {
    const visit = (node: ts.Node): ts.Node => {
      if (library.isFunctionLike(node) || library.isClassLike(node)) return node;
      const visited = library.visitEachChild(node, visit, context);
      if (!library.isAwaitExpression(visited)) return visited;
      return factory.createParenthesizedExpression(
        factory.createYieldExpression(undefined, visited.expression),
      );
    };
    return (file) =>
      hasTopLevelForAwait(library, file.text) ? file : library.visitEachChild(file, visit, context);
  };
}
