import { join } from "node:path";
import type ts from "typescript";
import type { PublicFunctions } from "./described-fields.js";

const root = join(import.meta.dirname, "..", "..");

/** Every function, option and property that a public type of this package has, as `Type.property`. */
export function publicNames({ checker, signatures }: PublicFunctions): ReadonlySet<string> {
  const names = new Set<string>(signatures.keys());
  const seen = new Set<ts.Type>();
  const visit = (type: ts.Type, where: string): void => {
    if (seen.has(type)) return;
    seen.add(type);
    for (const property of checker.getPropertiesOfType(type).filter(isOwn)) {
      names.add(`${where}.${property.name}`);
      enter(checker.getTypeOfSymbol(property), `${where}.${property.name}`);
    }
    for (const part of partsOf(type)) enter(part, where);
    for (const signature of type.getCallSignatures()) enterSignature(signature, where);
  };
  const enter = (type: ts.Type, where: string): void => visit(type, nameOf(type) ?? where);
  const enterSignature = (signature: ts.Signature, where: string): void => {
    enter(signature.getReturnType(), `${where}()`);
    for (const parameter of signature.parameters)
      enter(checker.getTypeOfSymbol(parameter), `${where}(${parameter.name})`);
  };
  for (const [name, own] of signatures) for (const signature of own) enterSignature(signature, name);
  return names;
}

const isOwn = ({ declarations = [] }: ts.Symbol): boolean => {
  const file = declarations[0]?.getSourceFile().fileName ?? "";
  return file.startsWith(root) && !file.includes("node_modules");
};

/** Types inside a type that are not under a property. */
function partsOf(type: ts.Type): readonly ts.Type[] {
  const members = type.isUnionOrIntersection() ? type.types : [];
  const held = [type.getNumberIndexType(), type.getStringIndexType()];
  return [...members, ...held.filter((each) => each !== undefined)];
}

function nameOf(type: ts.Type): string | undefined {
  // What a function gives of a rule or of a fit is the result that its alias is made from.
  const [, result] = type.aliasSymbol?.name === "ResultFor" ? (type.aliasTypeArguments ?? []) : [];
  if (result !== undefined) return nameOf(result);
  return type.aliasSymbol?.name ?? (type.isClassOrInterface() ? type.symbol.name : undefined);
}
