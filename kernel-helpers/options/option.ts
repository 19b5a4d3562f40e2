import { type Role, roleWords } from "./rule-names.js";

/** Lowest and highest admitted number; `above` and `below` leave the end itself out. */
export interface Range {
  readonly from?: number;
  readonly above?: number;
  readonly to?: number;
  readonly below?: number;
  readonly whole?: boolean;
  /** Whether it may be infinite. */
  readonly open?: boolean;
  /** Whether it may be NaN, where that marks a missing value. */
  readonly gaps?: boolean;
}

/** What a value may be, as data: the check, the help and the tests read the same. */
export type Kind =
  | ({ readonly is: "number" } & Range)
  | { readonly is: "text"; readonly words?: string; readonly names?: Role }
  | { readonly is: "bigint" | "flag" | "function" | "signal" | "anything" }
  | { readonly is: "choice"; readonly of: readonly string[] }
  /** Also a typed array, where it holds numbers. */
  | { readonly is: "list"; readonly of: Described; readonly length?: number; readonly least?: number }
  /** Values by name, whatever the names are. */
  | { readonly is: "named"; readonly of: Described; readonly names?: Role }
  | ({ readonly is: "shape" } & Shape)
  /** A shape for each value of one field. */
  | { readonly is: "variants"; readonly by: string; readonly of: Readonly<Record<string, Fields>> }
  /** A shape for each field that can name it; exactly one of these fields is given. */
  | { readonly is: "measures"; readonly of: Readonly<Record<string, Shape>>; readonly also?: Shape }
  | { readonly is: "either"; readonly of: readonly Described[] }
  | { readonly is: "result"; readonly of: string };

/** What a value may be, and one as an analyst would type it. */
export interface Described {
  readonly kind: Kind;
  readonly example: string;
}

/** A description that stands for the values of one type. The function is never there: it makes the type invariant. */
export interface Value<T> extends Described {
  readonly holds?: (value: T) => T;
}

/** One option of a function, or one field of an option. */
export interface Field extends Described {
  readonly need: "required" | "optional";
  /** One sentence for the analyst; the same text stands above the field of the type. */
  readonly says: string;
  /** The only first argument it goes with. */
  readonly of?: "rule" | "fit";
}

/** A field whose values have a type. */
export interface Option<T, Need extends Field["need"]> extends Field, Value<T> {
  readonly need: Need;
}

/** Options by name, whatever their types. */
export type Fields = Readonly<Record<string, Field>>;

/** Fields, and those of which exactly one must be given. */
export interface Shape {
  readonly fields: Fields;
  readonly oneOf?: readonly (readonly string[])[];
}

type KeyOf<T> = T extends unknown ? keyof T : never;
type At<T, K> = T extends unknown ? (K extends keyof T ? Required<T>[K] : never) : never;
type NeedOf<T, K> = T extends unknown
  ? K extends keyof T
    ? Record<never, never> extends Pick<T, K>
      ? "optional"
      : "required"
    : "optional"
  : never;

/**
 * An option for every field of a type and no other, each of the field's own type and as needed as the field is: the
 * compiler refuses a schema that does not agree with its type.
 */
export type Schema<T> = {
  readonly [K in KeyOf<T>]: Option<At<T, K>, "optional" extends NeedOf<T, K> ? "optional" : "required">;
};

/** An option that has no default. */
export function required<T>(value: Value<T>, says: string): Option<T, "required"> {
  return { ...value, need: "required", says: `${says}.` };
}

/** An option that may be left out; what then holds is said at the end of its sentence. */
export function optional<T>(
  value: Value<T>,
  says: string,
  byDefault?: string | number,
): Option<T, "optional"> {
  return {
    ...value,
    need: "optional",
    says: byDefault === undefined ? `${says}.` : `${says}; default ${byDefault}.`,
  };
}

/** An option that goes with one kind of first argument only. */
export const only = <T, Need extends Field["need"]>(
  of: "rule" | "fit",
  option: Option<T, Need>,
): Option<T, Need> => ({
  ...option,
  of,
});

export const number = (range: Range, example: number | string): Value<number> => ({
  kind: { is: "number", ...range },
  example: String(example),
});

export const whole = (from: number, example: number, to?: number): Value<number> =>
  number({ from, whole: true, ...(to !== undefined && { to }) }, example);

/** @param words - what the text is, after "must be": "the name of a column". */
export const text = (example: string, words?: string): Value<string> => ({
  kind: { is: "text", ...(words !== undefined && { words }) },
  example: JSON.stringify(example),
});

/** A name of the rule that a call is about. */
export const nameOf = (names: Role, example: string): Value<string> => ({
  kind: { is: "text", words: `the name of a ${roleWords[names]}`, names },
  example: JSON.stringify(example),
});

export const flag: Value<boolean> = { kind: { is: "flag" }, example: "true" };

export const oneOf = <T extends string>(...values: readonly T[]): Value<T> => ({
  kind: { is: "choice", of: values },
  example: JSON.stringify(values[0]),
});

export const listOf = <T>(of: Value<T>, example = `[${of.example}]`, least = 1): Value<readonly T[]> => ({
  kind: { is: "list", of, least },
  example,
});

/** Numbers in an array or a typed array. */
export const numbers = (example: string, least = 0): Value<ArrayLike<number>> => ({
  kind: { is: "list", of: number({ open: true, gaps: true }, 1), least },
  example,
});

export const pairOf = <T>(of: Value<T>, example: string): Value<readonly [T, T]> => ({
  kind: { is: "list", of, length: 2 },
  example,
});

/** @param names - what the names are of, where the rule that a call is about has them. */
export const named = <T>(
  of: Value<T>,
  example: string,
  names?: Role,
): Value<Readonly<Record<string, T>>> => ({
  kind: { is: "named", of, ...(names !== undefined && { names }) },
  example,
});

export const shapeOf = <T>(
  fields: Schema<T>,
  example: string,
  oneOfThem?: readonly (readonly string[])[],
): Value<T> => ({
  kind: { is: "shape", fields, ...(oneOfThem && { oneOf: oneOfThem }) },
  example,
});

/** A value of one of several kinds. */
export const either = <A, B>(first: Value<A>, second: Value<B>): Value<A | B> => ({
  kind: { is: "either", of: [first, second] },
  example: first.example,
});

export const func = <T>(example: string): Value<T> => ({ kind: { is: "function" }, example });

/** Another result of this package. */
export const resultOf = <T>(of: string, example: string): Value<T> => ({
  kind: { is: "result", of },
  example,
});

/** A value that is looked at where it is used. */
export const anything = <T>(example: string): Value<T> => ({ kind: { is: "anything" }, example });
