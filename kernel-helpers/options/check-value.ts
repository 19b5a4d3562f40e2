import type { Fault, Path } from "./fault.js";
import type { Described, Field, Fields, Kind, Range, Shape } from "./option.js";
import { nearestChoice } from "./other-words.js";
import type { Names, Role } from "./rule-names.js";
import { mustBe } from "./words-of-kind.js";
import { code, isNumbers, isPlain } from "./written.js";

type KindOf<Is extends Kind["is"]> = Extract<Kind, { is: Is }>;

/** A value with what it should be and where it stands. */
interface AnyCase extends Described {
  readonly value: unknown;
  readonly path: Path;
  readonly names: Names;
}

interface Case<Is extends Kind["is"]> extends AnyCase {
  readonly kind: KindOf<Is>;
}

/** The first thing that is wrong with a value; undefined where nothing is. */
export function faultOf(
  { kind, example }: Described,
  value: unknown,
  path: Path = [],
  names: Names = () => undefined,
): Fault | undefined {
  const one: AnyCase = { kind, example, value, path, names };
  if (!accepts(kind, value)) return wrong(one, meantNumber(kind, value) ?? exampleIn(one, names));
  const check = checks[kind.is] as ((one: AnyCase) => Fault | undefined) | undefined;
  return check?.(one);
}

/** An example that speaks of the rule of the call; undefined where the rule has nothing of the kind. */
function exampleIn({ kind, example }: Described, names: Names): unknown {
  if (kind.is === "list") {
    const inner = exampleIn(kind.of, names);
    return kind.of.kind.is === "text" && kind.of.kind.names ? [inner] : code(example);
  }
  if (kind.is === "measures")
    return code(example.replace('"N"', JSON.stringify(names("measured")?.[0] ?? "N")));
  const role = kind.is === "named" || kind.is === "text" ? kind.names : undefined;
  const known = role && names(role);
  if (known === undefined) return code(example);
  const [first] = known;
  if (first === undefined) return undefined;
  return kind.is === "named" ? { [first]: exampleIn(kind.of, names) } : first;
}

/** The first thing that is wrong with an object of options. */
export function shapeFault(
  { fields, oneOf = [] }: Shape,
  value: object,
  path: Path,
  names: Names,
): Fault | undefined {
  const given = Object.entries(value).filter(([, own]) => own !== undefined);
  const stranger = given.find(([name]) => !Object.hasOwn(fields, name));
  if (stranger !== undefined)
    return { kind: "unknown", path, name: stranger[0], value: stranger[1], known: fields };
  const present = given.map(([name]) => name);
  return (
    first(oneOf, (group) => oneOfFault(group, present, fields, path, names)) ??
    first(given, ([name, own]) => faultOf(fields[name]!, own, [...path, name], names)) ??
    missingFault(fields, present, path, names)
  );
}

const first = <T>(items: readonly T[], of: (item: T) => Fault | undefined): Fault | undefined => {
  for (const item of items) {
    const fault = of(item);
    if (fault !== undefined) return fault;
  }
  return undefined;
};

function oneOfFault(
  group: readonly string[],
  present: readonly string[],
  fields: Fields,
  path: Path,
  names: Names,
): Fault | undefined {
  const given = group.filter((name) => present.includes(name));
  if (given.length === 1) return undefined;
  if (given.length > 1) return { kind: "both", path, names: given };
  return missing(group, fields, path, names);
}

function missingFault(
  fields: Fields,
  present: readonly string[],
  path: Path,
  names: Names,
): Fault | undefined {
  const name = Object.keys(fields).find(
    (each) => fields[each]!.need === "required" && !present.includes(each),
  );
  return name === undefined ? undefined : missing([name], fields, path, names);
}

const missing = (group: readonly string[], fields: Fields, path: Path, names: Names): Fault => ({
  kind: "missing",
  path,
  fields: Object.fromEntries(group.map((name) => [name, fields[name]!])),
  instead: exampleIn(fields[group[0]!]!, names),
});

const wrong = ({ kind, value, path }: AnyCase, instead: unknown): Fault => ({
  kind: "wrong",
  path,
  must: mustBe(kind),
  value,
  instead,
});

/** A name that the rule of the call does not have. */
function strangerFault(
  { names }: AnyCase,
  role: Role,
  given: readonly string[],
  path: Path,
  isKey: boolean,
): Fault | undefined {
  const known = names(role);
  const name = given.find((each) => known !== undefined && !known.includes(each));
  return name === undefined ? undefined : { kind: "stranger", path, name, role, known: known!, isKey };
}

/** "12" where the number 12 would do. */
function meantNumber(kind: Kind, value: unknown): number | undefined {
  if (kind.is !== "number" || typeof value !== "string" || value.trim() === "") return undefined;
  return isWithin(kind, Number(value)) ? Number(value) : undefined;
}

/** Whether a value is of a kind at all, whatever it holds. */
function accepts(kind: Kind, value: unknown): boolean {
  switch (kind.is) {
    case "number":
    case "bigint":
    case "function":
      return typeof value === kind.is;
    case "text":
    case "choice":
      return typeof value === "string";
    case "flag":
      return typeof value === "boolean";
    case "list":
      return Array.isArray(value) || (kind.of.kind.is === "number" && isNumbers(value));
    case "either":
      return kind.of.some((each) => accepts(each.kind, value));
    case "signal":
      return typeof (value as { aborted?: unknown } | undefined)?.aborted === "boolean";
    case "result":
      return typeof value === "object" && (value as { kind?: unknown } | null)?.kind === kind.of;
    case "anything":
      return true;
  }
  return isPlain(value);
}

export function isWithin(range: Range, value: number): boolean {
  const { from = -Infinity, above = -Infinity, to = Infinity, below = Infinity } = range;
  if (Number.isNaN(value)) return range.gaps === true;
  if (range.whole === true && !Number.isSafeInteger(value)) return false;
  if (!Number.isFinite(value)) return range.open === true;
  return value >= from && value <= to && value > above && value < below;
}

/** A number near the one given that would do: 0.95 for 95, 4 for 3.5, 1 for 0. */
function nearNumber(range: Range, value: number, example: string): unknown {
  const { from, to } = range;
  const share = value > 1 ? [value / 100] : [];
  const near = [...share, Math.round(value), -value, ...[from, to].filter((end) => end !== undefined)];
  return near.find((each) => isWithin(range, each)) ?? code(example);
}

const checks: { readonly [Is in Kind["is"]]?: (one: Case<Is>) => Fault | undefined } = {
  number: (one) => {
    const value = one.value as number;
    return isWithin(one.kind, value) ? undefined : wrong(one, nearNumber(one.kind, value, one.example));
  },
  text: (one) => {
    const { kind, value, path } = one;
    const name = value as string;
    if (name.trim() === "" && kind.words !== undefined) return wrong(one, exampleIn(one, one.names));
    return kind.names && strangerFault(one, kind.names, [name], path, false);
  },
  choice: (one) => {
    const value = one.value as string;
    const { of } = one.kind;
    return of.includes(value) ? undefined : wrong(one, nearestChoice(value, of) ?? of[0]);
  },
  list: listFault,
  named: (one) => {
    const { kind, value, path, names } = one;
    const given = Object.entries(value as object).filter(([, own]) => own !== undefined);
    const keys = given.map(([name]) => name);
    return (
      (kind.names && strangerFault(one, kind.names, keys, path, true)) ??
      first(given, ([name, own]) => faultOf(kind.of, own, [...path, name], names))
    );
  },
  shape: ({ kind, value, path, names }) => shapeFault(kind, value as object, path, names),
  variants: variantFault,
  measures: measureFault,
  either: ({ kind, value, path, names }) => {
    const faults = kind.of
      .filter((each) => accepts(each.kind, value))
      .map((each) => faultOf(each, value, path, names));
    if (faults.includes(undefined)) return undefined;
    // The one that was meant is the one of which most is right.
    return faults.reduce((best, next) => (next!.path.length > best!.path.length ? next : best));
  },
};

function listFault(one: Case<"list">): Fault | undefined {
  const { kind, value, path, names } = one;
  const list = value as ArrayLike<unknown>;
  const { length: wanted, least = 0 } = kind;
  if (list.length < least || (wanted !== undefined && list.length !== wanted))
    return wrong(one, code(one.example));
  // What is in a long list or a typed array is looked at where it is used.
  if (kind.of.kind.is === "anything" || isNumbers(value) || list.length > 10_000) return undefined;
  return first([...Array.from(list).entries()], ([i, own]) => faultOf(kind.of, own, [...path, i], names));
}

function variantFault({ kind: { by, of }, value, path, names }: Case<"variants">): Fault | undefined {
  const given = value as Readonly<Record<string, unknown>>;
  const choices = Object.keys(of);
  const chosen: Field = {
    kind: { is: "choice", of: choices },
    example: JSON.stringify(choices[0]),
    need: "required",
    says: "",
  };
  const own = of[String(given[by])];
  if (own !== undefined) return shapeFault({ fields: { [by]: chosen, ...own } }, given, path, names);
  const any = Object.values(of).flatMap((fields) => Object.entries(fields));
  const loose = any.map(([name, field]) => [name, { ...field, need: "optional" }] as const);
  return shapeFault({ fields: { [by]: chosen, ...Object.fromEntries(loose) } }, given, path, names);
}

function measureFault({ kind: { of, also }, value, path, names }: Case<"measures">): Fault | undefined {
  const kinds = Object.keys(of);
  const named = kinds.filter((name) => Object.hasOwn(value as object, name));
  const [only] = named;
  const shapes: readonly Shape[] = named.length === 1 ? [of[only!]!] : Object.values(of);
  const fields = Object.assign({}, ...shapes.map((shape) => shape.fields), also?.fields) as Fields;
  const oneOf = named.length === 1 ? (of[only!]!.oneOf ?? []) : [kinds];
  return shapeFault({ fields, oneOf: [...oneOf, ...(also?.oneOf ?? [])] }, value as object, path, names);
}
