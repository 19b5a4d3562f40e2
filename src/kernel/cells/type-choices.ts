import type ts from "typescript-cell";

const shownChoices = 14;
const alikeFrom = 0.3;

/** The values that a choice admits: `It can be "debts", "cultures" or "stock".` */
export function choicesOf(checker: ts.TypeChecker, value: ts.Expression): string | undefined {
  const wanted = checker.getContextualType(value);
  const values = wanted?.isUnion() ? wanted.types.filter((one) => one.isLiteral()) : [];
  return values.length < 2
    ? undefined
    : `It can be ${values.map((one) => checker.typeToString(one)).join(", ")}.`;
}

/** The fields that an object may have there; those it must have with their types, the most alike name first. */
export function fieldsOf(
  library: typeof ts,
  checker: ts.TypeChecker,
  value: ts.Expression,
  given?: string,
): string | undefined {
  const wanted = checker.getContextualType(value);
  const names = wanted === undefined ? [] : fieldNames(library, checker, wanted, value);
  if (names.length === 0) return undefined;
  const alike =
    given === undefined ? names : [...names].sort((a, b) => likeness(b, given) - likeness(a, given));
  const more = names.length > shownChoices ? `, and ${names.length - shownChoices} more` : "";
  return `The fields there are ${alike.slice(0, shownChoices).join(", ")}${more}.`;
}

/** The argument that a call lacks, with its type and the fields that it must have. */
export function missingArgument(
  library: typeof ts,
  checker: ts.TypeChecker,
  at: ts.Node,
): string | undefined {
  let call: ts.Node = at;
  while (!library.isCallExpression(call) && !library.isNewExpression(call)) {
    if (library.isSourceFile(call)) return undefined;
    call = call.parent;
  }
  const given = call.arguments?.length ?? 0;
  const parameter = checker.getResolvedSignature(call)?.getParameters()[given];
  if (parameter === undefined) return undefined;
  const type = checker.getTypeOfSymbolAtLocation(parameter, call);
  const required = fieldNames(library, checker, type, call).filter((field) => field.includes(":"));
  // What has a kind is a result of another command, not something to be written out.
  const isResult = required.some((field) => field.startsWith("kind:"));
  const isOptions = required.length > 0 && !isResult && type.isClassOrInterface();
  const fields = isOptions ? `, which must have ${required.join(", ")}` : "";
  return `The argument "${parameter.name}" is missing: ${checker.typeToString(type)}${fields}.`;
}

/** Optional fields by name, required ones as `name: type`, choices written out. */
function fieldNames(
  library: typeof ts,
  checker: ts.TypeChecker,
  type: ts.Type,
  at: ts.Node,
): readonly string[] {
  const parts = type.isUnion() ? type.types : [type];
  const fields = parts.flatMap((part) => [...checker.getPropertiesOfType(part)]);
  const told = fields.map((field) => {
    if (field.flags & library.SymbolFlags.Optional) return field.name;
    const own = checker.getTypeOfSymbolAtLocation(field, at);
    return `${field.name}: ${checker.typeToString(own, undefined, library.TypeFormatFlags.InTypeAlias)}`;
  });
  return [...new Set(told)];
}

/** How many pairs of neighbouring letters a field's name shares with what was written. */
function likeness(field: string, given: string): number {
  const name = field.replace(/:.*/s, "").toLowerCase();
  const pairs = Array.from({ length: Math.max(1, given.length - 1) }, (_, i) =>
    given.toLowerCase().slice(i, i + 2),
  );
  const share = pairs.filter((pair) => name.includes(pair)).length / Math.max(name.length, given.length);
  return share < alikeFrom ? 0 : share;
}
