import type ts from "typescript-cell";

/** Where the name of the function stands whose brackets are open at the position: `fit(rule, |` -> within `fit`. */
export function enclosingCallee(library: typeof ts, text: string, position: number): number | undefined {
  const file = library.createSourceFile("cell.ts", text, library.ScriptTarget.ES2022);
  let callee: number | undefined;
  const visit = (node: ts.Node): void => {
    if (position < node.pos || position > node.end) return;
    if (library.isCallExpression(node) && position > node.expression.end) callee = node.expression.end - 1;
    library.forEachChild(node, visit);
  };
  visit(file);
  return callee;
}
