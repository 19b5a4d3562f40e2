import { ModelError } from "../../numeric/index.js";
import { suggestion } from "../errors.js";
import type { RecurrenceOptions } from "../recurrence-options.js";
import type { CheckedRule } from "./checked-rule.js";

function unknownOptionNameError(
  option: string,
  name: string,
  allowed: readonly string[],
  what: string,
): ModelError {
  const known = allowed.length === 0 ? "none" : allowed.join(", ");
  return new ModelError(
    "unknown-name",
    `Option \`${option}\`: the rule has no ${what} "${name}". It has ${known}.${suggestion(name, allowed)}`,
    { option, name, known: allowed },
  );
}

function optionValueError(option: string, name: string, wanted: string, given: unknown): ModelError {
  const shown = JSON.stringify(given) ?? String(given);
  return new ModelError(
    "unreadable-option",
    `Option \`${option}\`: "${name}" was given as ${shown}. Give ${wanted}.`,
    { option, name, given },
  );
}

function checkName(name: unknown): void {
  if (name === undefined || (typeof name === "string" && name.trim() !== "")) return;
  const given = JSON.stringify(name) ?? String(name);
  throw new ModelError(
    "unreadable-option",
    `Option \`name\` must be a non-empty string, but ${given} was given. Write \`name: "crowding"\`.`,
    { option: "name", given },
  );
}

type Accepts = (value: never, name: string) => boolean;
interface OptionCheck {
  readonly option: "units" | "bounds" | "start" | "fixed" | "initial" | "noise";
  readonly what: string;
  readonly names: readonly string[];
  readonly expected: (name: string) => string;
  readonly accepts: Accepts;
}

const isRange = (value: unknown): boolean =>
  Array.isArray(value) && value.length === 2 && value[0] < value[1];
const isBoundsWithBehaviour = (value: unknown): boolean => {
  const { range, atBounds } = (value ?? {}) as { readonly range?: unknown; readonly atBounds?: unknown };
  return isRange(range) && (atBounds === "absorbed" || atBounds === "error");
};
const isNumber = (value: unknown): boolean => typeof value === "number" && Number.isFinite(value);

function checks(rule: CheckedRule): readonly OptionCheck[] {
  const { states, parameters, quantities, inputs } = rule;
  const pastValues = (name: string): number => rule.lags.get(name) ?? 0;
  const number = (): string => "a finite number";
  return [
    {
      option: "units",
      what: "name",
      names: [...states, ...quantities, ...inputs, ...parameters, "t"],
      expected: () => 'a unit in quotes, such as "cells/mL"',
      accepts: (value: unknown) => typeof value === "string",
    },
    {
      option: "bounds",
      what: "state or parameter",
      names: [...states, ...parameters],
      expected: (name) =>
        `two numbers, the lower one first, as in [0, Infinity]${states.includes(name) ? ', or { range: [0, Infinity], atBounds: "error" } (or "absorbed")' : ""}`,
      accepts: (value: unknown, name: string) =>
        isRange(value) || (states.includes(name) && isBoundsWithBehaviour(value)),
    },
    { option: "start", what: "parameter", names: parameters, expected: number, accepts: isNumber },
    { option: "fixed", what: "parameter", names: parameters, expected: number, accepts: isNumber },
    {
      option: "initial",
      what: "state",
      names: states,
      expected: (name) =>
        pastValues(name) === 0
          ? 'a finite number or "estimated"'
          : `${pastValues(name) + 1} numbers, oldest first, because the rule reads ${name}[t-${pastValues(name)}]`,
      accepts: (value: unknown, name: string) =>
        value === "estimated" ||
        (pastValues(name) === 0
          ? isNumber(value)
          : Array.isArray(value) && value.length === pastValues(name) + 1 && value.every(isNumber)),
    },
    {
      option: "noise",
      what: "state",
      names: states,
      expected: () => '{ distribution: "normal" or "lognormal", sd: a number or the name of a parameter }',
      accepts: (value: { distribution?: unknown; sd?: unknown } | null) =>
        (value?.distribution === "normal" || value?.distribution === "lognormal") &&
        ((typeof value.sd === "string" && parameters.includes(value.sd)) ||
          (isNumber(value.sd) && (value.sd as number) >= 0)),
    },
  ];
}

/** Rejects options for names that the rule does not have, and values of the wrong kind. */
export function checkOptions(rule: CheckedRule, options: RecurrenceOptions): void {
  checkName(options.name);
  for (const { option, what, names, expected, accepts } of checks(rule)) {
    for (const [name, value] of Object.entries(options[option] ?? {})) {
      if (!names.includes(name)) throw unknownOptionNameError(option, name, names, what);
      // Each check narrows the values of its own option.
      if (!accepts(value as never, name)) throw optionValueError(option, name, expected(name), value);
    }
  }
}
