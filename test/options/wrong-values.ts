import type { Kind } from "../../kernel-helpers/options/option.js";
import { evaluate } from "./calls.js";

/** Values that are of no kind an option takes, by what JavaScript calls them. */
const ofEveryType: Readonly<Record<string, unknown>> = {
  number: 12,
  string: "no such value",
  boolean: true,
  null: null,
  list: [[]],
  object: { noSuchField: 1 },
  function: () => 0,
};

/** What a kind may be, by the same names. */
function typesOf(kind: Kind): readonly string[] {
  switch (kind.is) {
    case "number":
      return ["number"];
    case "text":
      return ["string"];
    case "flag":
      return ["boolean"];
    case "function":
      return ["function"];
    case "anything":
      return Object.keys(ofEveryType);
    case "either":
      return kind.of.flatMap((each) => typesOf(each.kind));
    // Whatever names there are is a matter of the rule; values under them are tried apart.
    case "named":
      return ["object"];
    case "list":
      return kind.of.kind.is === "anything" ? ["list"] : [];
    default:
      return [];
  }
}

/** A name that the rule of the examples has. */
const nameIn = ({ names = "state" }: { readonly names?: string }): string =>
  ["parameter", "free", "varied"].includes(names) ? "r" : "N";

/** Values of the wrong type for a kind, those inside lists and records as well. */
export function wrongTypes(kind: Kind): readonly unknown[] {
  const known = typesOf(kind);
  const own = Object.keys(ofEveryType).filter((type) => !known.includes(type));
  const values = own.map((type) => ofEveryType[type]);
  if (kind.is === "list") return [...values, ...wrongTypes(kind.of.kind).map((value) => listOf(kind, value))];
  return kind.is === "named"
    ? [...values, ...wrongTypes(kind.of.kind).map((value) => ({ [nameIn(kind)]: value }))]
    : values;
}

const listOf = ({ length = 1 }: { readonly length?: number }, value: unknown): readonly unknown[] =>
  new Array(length).fill(value);

/** Numbers outside the range of a kind, and words that are none of a choice. */
export function outOfRange(kind: Kind): readonly unknown[] {
  switch (kind.is) {
    case "choice":
      return ["no such choice", ""];
    case "list":
      return outOfRange(kind.of.kind).map((value) => listOf(kind, value));
    case "named":
      return outOfRange(kind.of.kind).map((value) => ({ [nameIn(kind)]: value }));
    case "number": {
      const { from, above, to, below, whole, open, gaps } = kind;
      const ends = [from !== undefined && from - 1, above, to !== undefined && to + 1, below];
      return [
        ...ends.filter((value) => typeof value === "number"),
        ...(whole ? [(from ?? 0) + 0.5] : []),
        ...(gaps ? [] : [Number.NaN]),
        ...(open ? [] : [Number.POSITIVE_INFINITY]),
      ];
    }
    default:
      return [];
  }
}

/** Values with a name that no rule has. */
export function unknownNames(kind: Kind): readonly unknown[] {
  switch (kind.is) {
    case "text":
      return kind.names === undefined ? [] : ["noSuchName"];
    case "named":
      return kind.names === undefined ? [] : [{ noSuchName: evaluate(kind.of.example) }];
    case "list":
      return unknownNames(kind.of.kind).map((value) => listOf(kind, value));
    case "either":
      return kind.of.flatMap((each) => unknownNames(each.kind));
    default:
      return [];
  }
}
