import { futureFormat, noSavedResult, notSavable } from "./refusals.js";

/** What a saved result calls itself, and the version of the form in which its parts are written. */
const format = "periodwise result";
const version = 1;

const arrays = {
  Float64Array,
  Float32Array,
  Int32Array,
  Int16Array,
  Int8Array,
  Uint32Array,
  Uint16Array,
  Uint8Array,
} as const;

type NumberArray = InstanceType<(typeof arrays)[keyof typeof arrays]>;

/** A result as it stands in a file: JSON values, and marked objects for what JSON cannot say. */
type Written = string | number | boolean | null | readonly Written[] | { readonly [name: string]: Written };

/** Begins the name of a marked object's only member: `{ "$number": "NaN" }`. */
const mark = "$";

/**
 * Writes a result as JSON text from which `loadResult` makes the same result again, every number with the same bits:
 * typed arrays, NaN, infinities, -0 and members that are undefined are kept. What a result shows itself by is not
 * part of it.
 *
 * @throws {ModelError} `not-savable` for functions and for objects with a class of their own.
 * @example loadResult(saveResult({ kind: "note", values: Float64Array.of(0.1, NaN) })); // the same
 */
export function saveResult(result: { readonly kind: string }): string {
  return JSON.stringify({ format, version, kind: result.kind, result: written(result, "result") });
}

/**
 * Makes a result again from what `saveResult` wrote.
 *
 * @throws {ModelError} `no-saved-result` for other text; `newer-format` for one written by a later version.
 */
export function loadResult<T extends { readonly kind: string }>(text: string): T {
  const head = headOf(text);
  if (head?.["format"] !== format) throw noSavedResult();
  const found = head["version"];
  if (typeof found !== "number" || found > version) throw futureFormat(found, version);
  // The text says what kind it is; a caller who knows it names the type.
  return read(head["result"] as Written) as T;
}

function headOf(text: string): { readonly [name: string]: unknown } | undefined {
  try {
    const head: unknown = JSON.parse(text);
    return typeof head === "object" && head !== null ? { ...head } : undefined;
  } catch {
    return undefined;
  }
}

function written(value: unknown, place: string): Written {
  switch (typeof value) {
    case "string":
    case "boolean":
      return value;
    case "number":
      return numeral(value, (special) => ({ $number: special }));
    case "undefined":
      return { $undefined: true };
    case "bigint":
      return { $bigint: value.toString() };
    case "object":
      return value === null ? null : writtenObject(value, place);
    default:
      throw notSavable(place, typeof value);
  }
}

/** A number as JSON writes it, which reads back with the same bits, or by name. */
function numeral<T>(value: number, named: (special: string) => T): number | T {
  if (Object.is(value, -0)) return named("-0");
  return Number.isFinite(value) ? value : named(String(value));
}

function writtenObject(value: object, place: string): Written {
  if (Array.isArray(value)) return value.map((part, i) => written(part, `${place}[${i}]`));
  const tag = Object.prototype.toString.call(value).slice(8, -1);
  if (tag in arrays)
    return { [mark + tag]: Array.from(value as NumberArray, (each) => numeral(each, (special) => special)) };
  if (tag !== "Object") throw notSavable(place, tag);
  const members = Object.entries(value).map(([name, part]): [string, Written] => [
    name,
    written(part, `${place}.${name}`),
  ]);
  // A record that has such a name of its own is written as a list of its members.
  if (members.some(([name]) => name.startsWith(mark))) return { $members: members };
  return Object.fromEntries(members);
}

function read(value: Written): unknown {
  if (typeof value !== "object" || value === null) return value;
  if (Array.isArray(value)) return value.map(read);
  const members = Object.entries(value as { readonly [name: string]: Written });
  const [only] = members;
  if (members.length === 1 && only![0].startsWith(mark)) return readMarked(only![0].slice(1), only![1]);
  return Object.fromEntries(members.map(([name, part]) => [name, read(part)]));
}

function readMarked(name: string, value: Written): unknown {
  if (name in arrays) {
    const numbers = (value as readonly (number | string)[]).map(Number);
    return arrays[name as keyof typeof arrays].from(numbers);
  }
  switch (name) {
    case "number":
      return Number(value);
    case "undefined":
      return undefined;
    case "bigint":
      return BigInt(value as string);
    case "members":
      return Object.fromEntries(
        (value as readonly [string, Written][]).map(([member, part]) => [member, read(part)]),
      );
    default:
      throw noSavedResult();
  }
}
