import type ts from "typescript-cell";

const maxChoices = 14;
const similarityThreshold = 0.3;

/** The values of a union: `Allowed values: "debts", "cultures", "stock".` */
export function choicesOf(checker: ts.TypeChecker, value: ts.Expression): string | undefined {
  const wanted = checker.getContextualType(value);
  const values = wanted?.isUnion() ? wanted.types.filter((one) => one.isLiteral()) : [];
  return values.length < 2
    ? undefined
    : `Allowed values: ${values.map((one) => checker.typeToString(one)).join(", ")}.`;
}

/** The fields that an object can have there, the most similar name first; required ones with their types. */
export function fieldsOf(
  library: typeof ts,
  checker: ts.TypeChecker,
  value: ts.Expression,
  given?: string,
): string | undefined {
  const wanted = checker.getContextualType(value);
  const names = wanted === undefined ? [] : fieldNames(library, checker, wanted, value);
  if (wanted === undefined || names.length === 0) return undefined;
  if (isResult(names)) return `A ${checker.typeToString(wanted)} is the result of another function.`;
  const bySimilarity =
    given === undefined
      ? names
      : [...names].sort((a, b) => bigramSimilarity(b, given) - bigramSimilarity(a, given));
  const more = names.length > maxChoices ? `, and ${names.length - maxChoices} more` : "";
  return `Available fields: ${bySimilarity.slice(0, maxChoices).join(", ")}${more}.`;
}

/** The missing argument of a call, with its type and required fields. */
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
  const isOptions = required.length > 0 && !isResult(required) && type.isClassOrInterface();
  const fields = isOptions ? ` with ${required.join(", ")}` : "";
  return `Argument \`${parameter.name}\` is missing: ${checker.typeToString(type)}${fields}.`;
}

/** A type with a kind is the result of another function, not something to write out. */
const isResult = (fields: readonly string[]): boolean => fields.some((field) => field.startsWith("kind:"));

/** Optional fields by name, required ones as `name: type`, with unions written out; each once, whatever has it. */
function fieldNames(
  library: typeof ts,
  checker: ts.TypeChecker,
  type: ts.Type,
  at: ts.Node,
): readonly string[] {
  const parts = type.isUnion() ? type.types : [type];
  const types = new Map<string, Set<string>>();
  for (const field of parts.flatMap((part) => [...checker.getPropertiesOfType(part)])) {
    const own = checker.getTypeOfSymbolAtLocation(field, at);
    const isOptional = (field.flags & library.SymbolFlags.Optional) !== 0;
    const text = isOptional ? "" : checker.typeToString(own, undefined, library.TypeFormatFlags.InTypeAlias);
    types.set(field.name, (types.get(field.name) ?? new Set()).add(text));
  }
  return Array.from(types, ([name, own]) => (own.has("") ? name : `${name}: ${[...own].join(" | ")}`));
}

/** Share of the letter pairs (bigrams) that a field's name has in common with the text given. */
function bigramSimilarity(field: string, given: string): number {
  const name = field.replace(/:.*/s, "").toLowerCase();
  const pairs = Array.from({ length: Math.max(1, given.length - 1) }, (_, i) =>
    given.toLowerCase().slice(i, i + 2),
  );
  const share = pairs.filter((pair) => name.includes(pair)).length / Math.max(name.length, given.length);
  return share < similarityThreshold ? 0 : share;
}
