import { ModelError } from "../../numeric/index.js";
import type { Bounds, RecurrenceOptions } from "../recurrence-options.js";
import { suggestion } from "../refusals.js";
import type { CheckedRule } from "./checked-rule.js";

function refuseName(option: string, name: string, allowed: readonly string[], what: string): ModelError {
  const known = allowed.length === 0 ? "none" : allowed.join(", ");
  return new ModelError(
    "unknown-name",
    `The option ${option} speaks of "${name}", which is no ${what} of the rule. Known: ${known}.${suggestion(name, allowed)}`,
    { option, name, known: allowed },
  );
}

function refuseValue(option: string, name: string, wanted: string, given: unknown): ModelError {
  const shown = JSON.stringify(given) ?? String(given);
  return new ModelError(
    "unreadable-option",
    `The option ${option} gives ${shown} for "${name}". Give ${wanted}.`,
    { option, name, given },
  );
}

type Fits = (value: never, name: string) => boolean;
interface OptionCheck {
  readonly option: "units" | "bounds" | "start" | "fixed" | "initial" | "noise";
  readonly what: string;
  readonly names: readonly string[];
  readonly wanted: (name: string) => string;
  readonly fits: Fits;
}

const isRange = (value: unknown): boolean =>
  Array.isArray(value) && value.length === 2 && value[0] < value[1];
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
      wanted: () => 'a text such as "cells/mL"',
      fits: (value: unknown) => typeof value === "string",
    },
    {
      option: "bounds",
      what: "state or parameter",
      names: [...states, ...parameters],
      wanted: (name) =>
        `two numbers, lowest first, as in [0, Infinity]${states.includes(name) ? ', or { range: [0, Infinity], atBounds: "absorbed" | "error" }' : ""}`,
      fits: (value: Bounds | null, name: string) =>
        isRange(value) ||
        (states.includes(name) &&
          isRange((value as { range?: unknown } | null)?.range) &&
          ["absorbed", "error"].includes((value as { atBounds: string }).atBounds)),
    },
    { option: "start", what: "parameter", names: parameters, wanted: number, fits: isNumber },
    { option: "fixed", what: "parameter", names: parameters, wanted: number, fits: isNumber },
    {
      option: "initial",
      what: "state",
      names: states,
      wanted: (name) =>
        pastValues(name) === 0
          ? 'a finite number or "estimated"'
          : `${pastValues(name) + 1} numbers, oldest first, because the rule reads ${name}[t-${pastValues(name)}]`,
      fits: (value: unknown, name: string) =>
        value === "estimated" ||
        (pastValues(name) === 0
          ? isNumber(value)
          : Array.isArray(value) && value.length === pastValues(name) + 1 && value.every(isNumber)),
    },
    {
      option: "noise",
      what: "state",
      names: states,
      wanted: () =>
        '{ distribution: "normal" | "lognormal", sd: a number or the name of a parameter of the rule }',
      fits: (value: { distribution?: unknown; sd?: unknown } | null) =>
        (value?.distribution === "normal" || value?.distribution === "lognormal") &&
        ((typeof value.sd === "string" && parameters.includes(value.sd)) ||
          (isNumber(value.sd) && (value.sd as number) >= 0)),
    },
  ];
}

/** Refuses options that speak of names the rule has not, or give values that fit no meaning. */
export function checkOptions(rule: CheckedRule, options: RecurrenceOptions): void {
  for (const { option, what, names, wanted, fits } of checks(rule)) {
    for (const [name, value] of Object.entries(options[option] ?? {})) {
      if (!names.includes(name)) throw refuseName(option, name, names, what);
      // Each check reads what its own option may hold.
      if (!fits(value as never, name)) throw refuseValue(option, name, wanted(name), value);
    }
  }
}
