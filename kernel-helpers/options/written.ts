/** A piece of code that stands for a value in a suggestion. */
interface Code {
  readonly code: string;
}

const codes = new WeakSet<object>();

/** Code to be written as it stands. */
export function code(text: string): Code {
  const made = { code: text };
  codes.add(made);
  return made;
}

/** The text of a piece of code. */
export const codeOf = (value: unknown): string | undefined =>
  typeof value === "object" && value !== null && codes.has(value) ? (value as Code).code : undefined;

/** Whether a value is an object without a class; one made in another realm, as that of a cell, is one too. */
export const isPlain = (value: unknown): value is Readonly<Record<string, unknown>> => {
  if (typeof value !== "object" || value === null || Array.isArray(value)) return false;
  const prototype: unknown = Object.getPrototypeOf(value);
  return prototype === null || Object.getPrototypeOf(prototype) === null;
};

export const isNumbers = (value: unknown): value is ArrayLike<number> =>
  ArrayBuffer.isView(value) && !(value instanceof DataView);

const longestSuggestion = 90;

/** A value as it is typed; undefined where it is too long to be repeated, or cannot be written out. */
export function typed(value: unknown): string | undefined {
  try {
    const text = literal(value);
    return text.length > longestSuggestion ? undefined : text;
  } catch {
    return undefined;
  }
}

function literal(value: unknown): string {
  const text = codeOf(value);
  if (text !== undefined) return text;
  if (Array.isArray(value)) return `[${value.map(literal).join(", ")}]`;
  if (isPlain(value)) {
    const fields = Object.entries(value).map(([name, own]) => `${key(name)}: ${literal(own)}`);
    return fields.length === 0 ? "{}" : `{ ${fields.join(", ")} }`;
  }
  switch (typeof value) {
    case "string":
      return JSON.stringify(value);
    case "bigint":
      return `${value}n`;
    case "number":
    case "boolean":
    case "undefined":
      return String(value);
  }
  if (value === null) return "null";
  throw new TypeError("no literal");
}

const key = (name: string): string =>
  /^[\p{L}_$][\p{L}\p{N}_$]*$|^\d+$/u.test(name) ? name : JSON.stringify(name);

/** Kinds of results in words. */
const results: Readonly<Record<string, string>> = {
  observations: "observations",
  differences: "differences",
  decisions: "a decisions log",
};

/** What was given, as an error names it: a short value as it was typed, anything else by what it is. */
export function given(value: unknown): string {
  if (value === undefined) return "nothing";
  if (typeof value === "function") return "a function";
  if (typeof value !== "object" || value === null) return cut(typed(value) ?? String(value));
  if (isPromise(value)) return "a promise";
  if (isFrame(value)) return "a DataFrame";
  const { kind, length } = value as { kind?: unknown; length?: unknown };
  // What an analyst typed as { kind: "gaussian" } is short; a result is not.
  const short = typed(value);
  if (short !== undefined) return short;
  if (typeof kind === "string") return results[kind] ?? withArticle(kind);
  return typeof length === "number" ? `a list of ${length}` : "an object";
}

export const isPromise = (value: object): boolean => typeof (value as { then?: unknown }).then === "function";

const cut = (text: string): string => (text.length > 60 ? `${text.slice(0, 57)}...` : text);

const withArticle = (kind: string): string =>
  `${/^[aeiou]/.test(kind) ? "an" : "a"} ${kind.replace(/-/g, " ")}`;

/** Recognised by shape, because a frame may come from another copy of its library. */
export function isFrame(value: unknown): boolean {
  if (typeof value !== "object" || value === null) return false;
  const { columns, iloc } = value as { columns?: unknown; iloc?: unknown };
  return Array.isArray(columns) && typeof iloc === "function";
}
