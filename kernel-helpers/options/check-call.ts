import { isOf } from "./argument.js";
import { faultOf, shapeFault } from "./check-value.js";
import {
  argumentError,
  noOptionsError,
  optionError,
  otherSubjectError,
  plainArgumentError,
  tooLargeError,
  tooManyArgumentsError,
} from "./errors.js";
import type { Argument, FunctionSchema, Size } from "./function-schema.js";
import { functions } from "./functions.js";
import { namesOf } from "./rule-names.js";
import { isPlain, typed } from "./written.js";

/**
 * Checks what a public function was given against its schema; every such function begins with it.
 *
 * @throws {ModelError} `argument-wrong` | `option-unknown` | `option-missing` | `option-wrong` | `option-conflict` |
 *   `option-too-large`.
 */
export function checkCall(name: string, all: ArrayLike<unknown>): void {
  const schema = functions.get(name)!;
  const given = withoutMapArguments(Array.from(all));
  for (const [place, argument] of schema.takes.entries()) checkArgument(schema, argument, place, given);
  const count = schema.takes.length + (schema.options === undefined ? 0 : 1);
  if (given.length > count) throw tooManyArgumentsError(schema, given[count]);
  if (schema.options !== undefined) checkOptions(schema, given);
}

/** `fits.map(check)` hands each fit its place and the list as well. */
function withoutMapArguments(given: readonly unknown[]): readonly unknown[] {
  const [value, place, list] = given;
  const mapped = given.length === 3 && Array.isArray(list) && list[place as number] === value;
  return mapped ? [value] : given;
}

function checkArgument(
  schema: FunctionSchema,
  argument: Argument,
  place: number,
  given: readonly unknown[],
): void {
  const value = given[place];
  if (value === undefined && argument.mayBeLeftOut === true) return;
  const { name, takes } = argument;
  if (!("kind" in takes)) {
    if (!takes.some((kind) => isOf(kind, value))) throw argumentError(schema, place, takes, given);
  } else if (faultOf(takes, value, []) !== undefined) throw plainArgumentError(schema, name, takes, value);
}

function checkOptions(schema: FunctionSchema, given: readonly unknown[]): void {
  const { takes, options: shape, instead, sizes = [] } = schema;
  const value = given[takes.length];
  if (value !== undefined && instead !== undefined && faultOf(instead, value, []) === undefined) return;
  if (value !== undefined && (!isPlain(value) || isResult(value))) throw noOptionsError(schema, value);
  const options = value ?? {};
  const subject = (given[0] as { kind?: unknown } | undefined)?.kind;
  for (const [name, { of }] of Object.entries(shape!.fields))
    if (of !== undefined && of !== subject && options[name] !== undefined) throw otherSubjectError(name, of);
  const fault = shapeFault(shape!, options, [], namesOf(given[0], options));
  if (fault !== undefined) throw optionError(fault, schema, options);
  for (const size of sizes) checkSize(size, options, given);
}

/** A result has a kind as well, but is more than anyone types. */
const isResult = (value: object): boolean => isOf("result", value) && typed(value) === undefined;

function checkSize(
  { option, bytes }: Size,
  options: Readonly<Record<string, unknown>>,
  given: readonly unknown[],
): void {
  const needed = bytes(options, given);
  if (needed <= largest) return;
  const count = options[option] as number;
  throw tooLargeError(option, count, needed, roundedDown((count * largest) / needed));
}

/** Bytes that the values of one call may take. */
const largest = 1e9;

/** To one digit. */
const roundedDown = (value: number): number => {
  const unit = 10 ** Math.floor(Math.log10(value));
  return Math.floor(value / unit) * unit;
};
