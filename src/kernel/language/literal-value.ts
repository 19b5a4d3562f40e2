import type ts from "typescript-cell";

/** The value of a literal expression; `undefined` for anything that would have to be run. */
export function literalValue(library: typeof ts, node: ts.Expression): unknown {
  if (library.isStringLiteralLike(node)) return node.text;
  if (library.isNumericLiteral(node)) return Number(node.text);
  if (library.isArrayLiteralExpression(node))
    return allKnown(node.elements.map((one) => literalValue(library, one)));
  if (library.isObjectLiteralExpression(node)) return objectValue(library, node);
  return undefined;
}

function allKnown(values: readonly unknown[]): readonly unknown[] | undefined {
  return values.includes(undefined) ? undefined : values;
}

/** Properties that are not literals have the value undefined. */
function objectValue(library: typeof ts, node: ts.ObjectLiteralExpression): object | undefined {
  const read: Record<string, unknown> = {};
  for (const property of node.properties) {
    const { name } = property;
    if (name === undefined || !(library.isIdentifier(name) || library.isStringLiteral(name)))
      return undefined;
    read[name.text] = library.isPropertyAssignment(property)
      ? literalValue(library, property.initializer)
      : undefined;
  }
  return read;
}
