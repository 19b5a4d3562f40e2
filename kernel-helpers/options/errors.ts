import { ModelError, nearestNames } from "../../src/numeric/index.js";
import { list } from "../wording/index.js";
import { type ArgumentKind, adviceFor, argumentWords, isOf } from "./argument.js";
import { faultOf } from "./check-value.js";
import type { Fault, Path } from "./fault.js";
import type { FunctionSchema } from "./function-schema.js";
import type { Described, Fields } from "./option.js";
import { meant, nearestChoice } from "./other-words.js";
import { roleWords } from "./rule-names.js";
import { inCode, mustBe } from "./words-of-kind.js";
import { code, codeOf, given, isPlain, typed } from "./written.js";

type Given = Readonly<Record<string, unknown>>;

/** The error of one fault, which names the option as it was typed and what to type instead. */
export function optionError(fault: Fault, { name }: FunctionSchema, options: Given): ModelError {
  switch (fault.kind) {
    case "wrong":
      return wrongError(fault, options);
    case "unknown":
      return unknownError(fault, name, options);
    case "missing":
      return missingError(fault, name, options);
    case "stranger":
      return strangerError(fault, options);
    case "both":
      return new ModelError(
        "option-conflict",
        `${list(fault.names.map(inCode))}${inside(fault.path)} were both given. Give one of them.`,
        { options: fault.names },
      );
  }
}

function wrongError(
  { path, must, value, instead }: Extract<Fault, { kind: "wrong" }>,
  options: Given,
): ModelError {
  return new ModelError(
    "option-wrong",
    `Option ${inCode(placeOf(path))} must be ${must}; ${given(value)} was given.${write(options, path, instead)}`,
    { option: placeOf(path), value },
  );
}

function unknownError(
  { path, name, value, known }: Extract<Fault, { kind: "unknown" }>,
  called: string,
  options: Given,
): ModelError {
  const names = Object.keys(known);
  const near = meant(name, names);
  const hint = near.length === 0 ? "" : ` Did you mean ${list(near.map(inCode), "or")}?`;
  const renamed = near.length === 0 ? "" : writeRenamed(options, path, name, near[0]!, known);
  const what = path.length === 0 ? `option ${inCode(name)}` : `field ${inCode(name)}${inside(path)}`;
  const taker = path.length === 0 ? inCode(called) : inCode(placeOf(path));
  return new ModelError(
    "option-unknown",
    `Unknown ${what}.${hint}${renamed} ${taker} takes ${list(names.map(inCode))}.`,
    { option: [...path, name].join("."), value, known: names, nearest: near },
  );
}

function missingError(
  { path, fields, instead }: Extract<Fault, { kind: "missing" }>,
  called: string,
  options: Given,
): ModelError {
  const names = Object.keys(fields);
  const name = names[0]!;
  const field = fields[name]!;
  const which =
    names.length === 1 ? `the option ${inCode(name)}` : `one of the options ${list(names.map(inCode), "or")}`;
  const needs =
    path.length === 0
      ? `${inCode(called)} needs ${which}`
      : `Option ${inCode(placeOf(path))} lacks ${list(names.map(inCode), "or")}`;
  const must = names.length === 1 ? `, ${mustBe(field.kind)}` : "";
  return new ModelError("option-missing", `${needs}${must}.${write(options, [...path, name], instead)}`, {
    options: names,
  });
}

function strangerError(
  { path, name, role, known, isKey }: Extract<Fault, { kind: "stranger" }>,
  options: Given,
): ModelError {
  const near = nearestNames(name, known);
  const right = near[0] ?? (known.length === 1 ? known[0] : undefined);
  const none = `It has no ${roleWords[role]} at all; leave ${inCode(String(path[0]))} out`;
  const has = known.length === 0 ? none : `It has ${list(known)}`;
  const hint =
    near.length === 0
      ? ""
      : ` Did you mean ${list(
          near.map((each) => JSON.stringify(each)),
          "or",
        )}?`;
  const change =
    right === undefined ? "" : isKey ? writeKey(options, path, name, right) : write(options, path, right);
  return new ModelError(
    "unknown-name",
    `Option ${inCode(placeOf(path))}: the rule has no ${roleWords[role]} ${JSON.stringify(name)}. ${has}.${hint}${change}`,
    { option: placeOf(path), name, known },
  );
}

/** @param place - 0 for the first argument. */
export function argumentError(
  schema: FunctionSchema,
  place: number,
  wanted: readonly ArgumentKind[],
  all: readonly unknown[],
): ModelError {
  const value = all[place];
  // Any object may be a record.
  const isElsewhere = all.some((each) => wanted.some((kind) => kind !== "record" && isOf(kind, each)));
  const advice = isElsewhere ? "Give the arguments in this order" : adviceFor(wanted, value);
  const which = schema.takes.length > 1 ? ` as its ${ordinals[place]} argument` : "";
  const words = wanted.map((kind) => argumentWords[kind]);
  return new ModelError(
    "argument-wrong",
    `${inCode(schema.name)} needs ${list(words, "or")}${which}, not ${given(value)}. ${advice}: ${inCode(schema.example)}.`,
    { argument: schema.takes[place]?.name, place: place + 1 },
  );
}

const ordinals = ["first", "second", "third", "fourth"];

export function plainArgumentError(
  schema: FunctionSchema,
  name: string,
  wanted: Described,
  value: unknown,
): ModelError {
  return new ModelError(
    "argument-wrong",
    `The ${inCode(name)} of ${inCode(schema.name)} must be ${mustBe(wanted.kind)}; ${given(value)} was given. Write ${inCode(schema.example)}.`,
    { argument: name, value },
  );
}

/** @param value - what stands where the options belong. */
export function noOptionsError(schema: FunctionSchema, value: unknown): ModelError {
  return new ModelError(
    "argument-wrong",
    `The options of ${inCode(schema.name)} are an object; ${given(value)} was given. Write ${inCode(schema.example)}.`,
    { value },
  );
}

export function tooManyArgumentsError(schema: FunctionSchema, value: unknown): ModelError {
  const options = schema.options === undefined ? "no options" : "its options as the last argument";
  return new ModelError(
    "argument-wrong",
    `${inCode(schema.name)} takes ${options}; ${given(value)} was given as well. Write ${inCode(schema.example)}.`,
    { value },
  );
}

/** @param of - what the option goes with. */
export function otherSubjectError(option: string, of: "rule" | "fit"): ModelError {
  const why =
    of === "rule"
      ? "goes with a rule, and a fit was given, which brings its own. Leave it out, or give `fit.rule`"
      : "goes with a fit, and a rule was given. Leave it out";
  return new ModelError("option-conflict", `Option ${inCode(option)} ${why}.`, { option, of });
}

const gigabyte = 1e9;

/** @param most - largest value that fits. */
export function tooLargeError(option: string, value: number, bytes: number, most: number): ModelError {
  const size =
    bytes >= 1000 * gigabyte
      ? `${Math.round(bytes / gigabyte / 1000)} TB`
      : `${Math.round(bytes / gigabyte)} GB`;
  return new ModelError(
    "option-too-large",
    `Option ${inCode(option)} is too large: ${value} would need about ${size} of memory, and a call may use 1 GB. Write ${inCode(`${option}: ${most}`)} or less.`,
    { option, value, bytes, most },
  );
}

const inside = (path: Path): string => (path.length === 0 ? "" : ` in option ${inCode(placeOf(path))}`);

/** "noise.N.sd", "levels[1]". */
function placeOf(path: Path): string {
  return path.reduce<string>(
    (place, step) =>
      typeof step === "number" ? `${place}[${step}]` : place === "" ? step : `${place}.${step}`,
    "",
  );
}

/** The whole option with the wrong part put right, as it is typed. */
function write(options: Given, path: Path, instead: unknown): string {
  const [name] = path as [string];
  const text =
    typed(withPart(options, path, instead)[name]) ?? (path.length === 1 ? codeOf(instead) : undefined);
  return text === undefined ? "" : ` Write ${inCode(`${name}: ${text}`)}.`;
}

/** The same with a field under the name that was meant. */
function writeRenamed(options: Given, path: Path, name: string, meantName: string, known: Fields): string {
  const { [name]: value, ...rest } = partAt(options, path);
  const others = Object.fromEntries(Object.entries(rest).filter(([each]) => Object.hasOwn(known, each)));
  const own = translated(name, value, known[meantName]!);
  return path.length === 0
    ? write({}, [meantName], own)
    : write(options, path, { ...others, [meantName]: own });
}

/** The same with a value under another name. */
function writeKey(options: Given, path: Path, name: string, right: string): string {
  const { [name]: value, ...others } = partAt(options, path);
  return write(options, path, { ...others, [right]: value });
}

const partAt = (options: Given, path: Path): Given =>
  path.reduce<unknown>((own, step) => (own as Given)[step], options) as Given;

/** A value given under another word, as the option takes it. */
function translated(word: string, value: unknown, field: Described): unknown {
  const { kind, example } = field;
  const share = /^(alpha|significance)$/i.test(word) && typeof value === "number" ? [1 - value] : [];
  const choice = kind.is === "choice" ? nearestChoice(String(value), kind.of) : undefined;
  const all = [...share, value, [value], choice];
  return all.find((each) => each !== undefined && faultOf(field, each) === undefined) ?? code(example);
}

function withPart(whole: unknown, [step, ...rest]: Path, part: unknown): Given {
  if (step === undefined) return part as Given;
  const own = isPlain(whole) || Array.isArray(whole) ? (whole as Given) : {};
  const changed = { ...own, [step]: withPart(own[step], rest, part) };
  return Array.isArray(own) ? (Object.values(changed) as unknown as Given) : changed;
}
