import type { Level } from "../../src/projection/index.js";
import { anyNumber } from "./common-options.js";
import {
  either,
  nameOf,
  number,
  type Option,
  optional,
  required,
  type Schema,
  shapeOf,
  type Value,
} from "./option.js";

const of = required(nameOf("levelled", "K"), 'The parameter or first value, as "K" or "N[0]"');

const share: Schema<Extract<Level, { readonly share: number }>> = {
  share: required(number({}, 0.9), "Share of a parameter or of a first value"),
  of,
};

const logs: Schema<Extract<Level, { readonly logs: number }>> = {
  logs: required(number({ above: 0 }, 6), "Powers of ten from a parameter or a first value"),
  of,
};

const level: Value<Level> = either(
  either(anyNumber, shapeOf(share, '{ share: 0.9, of: "K" }')),
  shapeOf(logs, '{ logs: 6, of: "N[0]" }'),
);

const forms = 'a number, or one such as `{ share: 0.9, of: "K" }` or `{ logs: 6, of: "N[0]" }`';

/** A level that is reached from below or from above: exactly one of them is given. */
export const crossed: {
  readonly risesTo: Option<Level, "optional">;
  readonly fallsTo: Option<Level, "optional">;
} = {
  risesTo: optional(level, `Level that is reached from below, in the unit of the state: ${forms}`),
  fallsTo: optional(level, `Level that is reached from above, in the unit of the state: ${forms}`),
};

export const oneLevel: readonly (readonly string[])[] = [["risesTo", "fallsTo"]];
