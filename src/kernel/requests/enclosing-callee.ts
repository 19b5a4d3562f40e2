import type ts from "typescript-cell";

/** Position of the name of the function whose brackets are open at the cursor: `fit(rule, |` -> within `fit`. */
export function enclosingCallee(library: typeof ts, text: string, position: number): number | undefined {
  const file = library.createSourceFile("cell.ts", text, library.ScriptTarget.ES2022);
  let callee: number | undefined;
  const visit = (node: ts.Node): void => {
    if (position < node.pos) return;
    if (library.isCallExpression(node) && isInBrackets(node, text, position))
      callee = node.expression.end - 1;
    library.forEachChild(node, visit);
  };
  visit(file);
  return callee;
}

/** The brackets of a call that is still being typed extend to the end of the text. */
function isInBrackets({ expression, end }: ts.CallExpression, text: string, position: number): boolean {
  return position > expression.end && (position < end || text[end - 1] !== ")");
}
