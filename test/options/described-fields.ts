import { join } from "node:path";
import ts from "typescript";
import { functions } from "../../kernel-helpers/options/functions.js";
import type { Field, Kind, Shape } from "../../kernel-helpers/options/option.js";

const root: string = join(import.meta.dirname, "..", "..");
const face: string = join(root, "kernel-helpers", "index.ts");

/** A field of an option type with the field of the schema that describes it. */
export interface DescribedField {
  readonly name: string;
  /** Where it is declared. */
  readonly declaration: ts.Declaration;
  /** The comment above it. */
  readonly comment: string;
  readonly field: Field;
}

/** The public functions by name, as the compiler knows them; makers of the catalogue as `rules.logistic`. */
export interface PublicFunctions {
  readonly checker: ts.TypeChecker;
  readonly signatures: ReadonlyMap<string, readonly ts.Signature[]>;
}

/** Reads the public list with the compiler's own settings. */
export function publicFunctions(): PublicFunctions {
  const settings = ts.readConfigFile(join(root, "tsconfig.json"), ts.sys.readFile).config as {
    compilerOptions: object;
  };
  const { options } = ts.convertCompilerOptionsFromJson(settings.compilerOptions, root);
  const program = ts.createProgram([face], { ...options, noEmit: true, composite: false });
  const checker = program.getTypeChecker();
  const file = program.getSourceFile(face)!;
  const signatures = new Map<string, readonly ts.Signature[]>();
  for (const exported of checker.getExportsOfModule(checker.getSymbolAtLocation(file)!)) {
    const symbol = exported.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(exported) : exported;
    if (!(symbol.flags & ts.SymbolFlags.Value)) continue;
    const type = checker.getTypeOfSymbolAtLocation(symbol, file);
    if (type.getCallSignatures().length > 0) signatures.set(exported.name, type.getCallSignatures());
    if (exported.name !== "rules") continue;
    for (const rule of type.getProperties())
      signatures.set(`rules.${rule.name}`, checker.getTypeOfSymbol(rule).getCallSignatures());
  }
  return { checker, signatures };
}

/** The type of a function's options: of one that asks a rule or a fit, those of a rule. */
export function optionsType(
  checker: ts.TypeChecker,
  signatures: readonly ts.Signature[],
): ts.Type | undefined {
  const last = signatures[0]?.parameters.at(-1);
  if (last === undefined) return undefined;
  const type = checker.getNonNullableType(checker.getTypeOfSymbol(last));
  return type.flags & ts.TypeFlags.Conditional ? type.aliasTypeArguments?.[1] : type;
}

/** Every field of a schema beside the field of the type that it describes, those inside other fields as well. */
export function describedFields({ checker, signatures }: PublicFunctions): readonly DescribedField[] {
  return [...functions.values()].flatMap(({ name, options }) => {
    const type = optionsType(checker, signatures.get(name) ?? []);
    if (type === undefined || options === undefined) return [];
    return fieldsOf(checker, type, options, true);
  });
}

function fieldsOf(
  checker: ts.TypeChecker,
  type: ts.Type,
  { fields }: Shape,
  isWhole: boolean,
): DescribedField[] {
  const properties = membersOf(type).flatMap((member) => member.getProperties());
  if (!isWhole && !sameNames(properties, fields)) return [];
  return properties.flatMap((property) => {
    const field = Object.hasOwn(fields, property.name) ? fields[property.name] : undefined;
    const [declaration] = property.declarations ?? [];
    if (field === undefined || declaration === undefined) return [];
    const own = {
      name: property.name,
      declaration,
      comment: ts.displayPartsToString(property.getDocumentationComment(checker)).replace(/\s+/g, " "),
      field,
    };
    const inside = objectsIn(checker, checker.getTypeOfSymbol(property), 4);
    const shapes = shapesIn(field.kind);
    return [
      own,
      ...shapes.flatMap((shape) => inside.flatMap((each) => fieldsOf(checker, each, shape, false))),
    ];
  });
}

const sameNames = (properties: readonly ts.Symbol[], fields: Shape["fields"]): boolean =>
  new Set(properties.map(({ name }) => name)).size === Object.keys(fields).length &&
  properties.every(({ name }) => Object.hasOwn(fields, name));

const membersOf = (type: ts.Type): readonly ts.Type[] => (type.isUnion() ? type.types : [type]);

/** Objects that a value of a type may be or hold. */
function objectsIn(checker: ts.TypeChecker, type: ts.Type, depth: number): readonly ts.Type[] {
  if (depth === 0) return [];
  return membersOf(type).flatMap((member) => {
    const held = [member.getNumberIndexType(), member.getStringIndexType()].filter(
      (each) => each !== undefined,
    );
    if (held.length > 0) return held.flatMap((each) => objectsIn(checker, each, depth - 1));
    return member.flags & ts.TypeFlags.Object && member.getCallSignatures().length === 0 ? [member] : [];
  });
}

/** Shapes that a kind may be or hold. */
function shapesIn(kind: Kind): readonly Shape[] {
  switch (kind.is) {
    case "shape":
      return [kind];
    case "list":
    case "named":
      return shapesIn(kind.of.kind);
    case "either":
      return kind.of.flatMap((each) => shapesIn(each.kind));
    default:
      return [];
  }
}
