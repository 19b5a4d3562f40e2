import type { InitialValues } from "../../src/dynamics/index.js";
import type { BoundBehaviour, Bounds } from "../../src/rule/index.js";
import type { Argument } from "./function-schema.js";
import {
  either,
  func,
  listOf,
  named,
  number,
  type Option,
  oneOf,
  optional,
  pairOf,
  required,
  shapeOf,
  type Value,
  whole,
} from "./option.js";
import type { Role } from "./rule-names.js";

export const rule: Argument = { name: "rule", takes: ["rule"] };
export const fit: Argument = { name: "fit", takes: ["fit"] };
export const ruleOrFit: Argument = { name: "subject", takes: ["rule", "fit"] };
export const observations: Argument = { name: "observations", takes: ["observations"] };
export const record: Argument = { name: "record", takes: ["record"] };

/** A share such as a confidence level. */
export const share: Value<number> = number({ above: 0, below: 1 }, 0.95);
export const anyNumber: Value<number> = number({}, 1);
export const positive: Value<number> = number({ above: 0 }, 1);
export const pair: Value<readonly [number, number]> = pairOf(number({}, 1), "[0, 100]");
/** A pair of limits, either of which may be infinite. */
export const limits: Value<readonly [number, number]> = pairOf(number({ open: true }, 1), "[0, Infinity]");
export const valuesByName = (names?: Role, example = "{ r: 0.5 }"): Value<Readonly<Record<string, number>>> =>
  named(number({}, 1), example, names);
export const limitsByName = (names?: Role): Value<Readonly<Record<string, readonly [number, number]>>> =>
  named(limits, "{ r: [0, 3] }", names);
/** Limits by name, and of a state also what happens there. */
export const boundsByName: Value<Readonly<Record<string, Bounds>>> = named(
  either(
    limits,
    shapeOf<Extract<Bounds, { readonly range: unknown }>>(
      {
        range: required(limits, "Lowest and highest value of the state"),
        atBounds: required(
          oneOf<BoundBehaviour>("absorbed", "error"),
          "What becomes of the state there: it stays at the bound for good, or the path ends",
        ),
      },
      '{ range: [0, 500], atBounds: "absorbed" }',
    ),
  ),
  "{ r: [0, 3] }",
);
/** A first value, or first values of a state with lags. */
export const firstValue: Value<number | readonly number[]> = either(
  number({}, 10),
  listOf(number({}, 10), "[8, 10]"),
);
export const firstValues: Value<InitialValues> = named(firstValue, "{ N: 10 }", "state");

export const seed: Option<number, "optional"> = optional(
  whole(0, 1, Number.MAX_SAFE_INTEGER),
  "Seed of the random numbers, a whole number",
  "that of the case, else 1",
);

export const intervalLevel: Option<number, "optional"> = optional(
  share,
  "Confidence level of the interval, between 0 and 1",
  0.95,
);

export const onProgress: Option<(done: number, of: number) => void, "optional"> = optional(
  func<(done: number, of: number) => void>("(done, of) => console.log(done, of)"),
  "Called now and then with how much is done and of how much; what it returns is ignored",
);

export const signal: Option<AbortSignal, "optional"> = optional(
  { kind: { is: "signal" }, example: "controller.signal" },
  "Signal of an AbortController that ends the run at its next report of progress; no result is kept",
);
