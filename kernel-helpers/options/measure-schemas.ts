import type { Measure, SolveOptions } from "../../src/decision/index.js";
import type { Level } from "../../src/projection/index.js";
import { anyNumber } from "./common-options.js";
import {
  either,
  type Fields,
  nameOf,
  number,
  type Option,
  optional,
  required,
  type Shape,
  shapeOf,
  text,
  type Value,
  whole,
} from "./option.js";

type MeasureKind = Measure extends infer Each ? (Each extends unknown ? keyof Each : never) : never;

/** What a measure is taken of. */
const name = required(nameOf("measured", "N"), "State or quantity that is measured");

const levelOf = required(nameOf("levelled", "K"), "Parameter or first value that the level is relative to");

/** A level: a number, a share of a parameter or first value, or decades below or above one. */
const level: Value<Level> = either(
  anyNumber,
  either(
    shapeOf<Extract<Level, { readonly share: number }>>(
      { share: required(number({}, 0.9), "Share of it"), of: levelOf },
      '{ share: 0.9, of: "K" }',
    ),
    shapeOf<Extract<Level, { readonly logs: number }>>(
      { logs: required(number({}, 6), "How many powers of ten from it"), of: levelOf },
      '{ logs: 6, of: "N[0]" }',
    ),
  ),
);

const quantile: Fields = {
  quantile: optional(
    number({ above: 0, below: 1 }, 0.95),
    "Quantile of the paths, between 0 and 1, where chance has a part",
    "their mean; of a time the median",
  ),
};

const window: Fields = {
  from: optional(whole(1, 1), "First period of the window, counted from the present", 1),
  to: optional(whole(1, 12), "Last period of the window, counted from the present", "the last one"),
};

/** A level that is reached from one side. */
export const crossed: {
  readonly risesTo: Option<Level, "optional">;
  readonly fallsTo: Option<Level, "optional">;
} = {
  risesTo: optional(level, "Level that is risen to, from below: a number, or relative to a parameter"),
  fallsTo: optional(level, "Level that is fallen to, from above: a number, or relative to a parameter"),
};

export const oneLevel: readonly (readonly string[])[] = [["risesTo", "fallsTo"]];

/** By the field that names it: what else a measure has. */
const kinds: Readonly<
  Record<Exclude<MeasureKind, "at" | "from" | "to" | "risesTo" | "fallsTo" | "quantile">, Shape>
> = {
  level: {
    fields: { level: name, at: required(number({ from: 0, whole: true }, 12), "Periods ahead"), ...quantile },
  },
  average: { fields: { average: name, ...window, ...quantile } },
  total: { fields: { total: name, ...window, ...quantile } },
  lowest: { fields: { lowest: name, ...window, ...quantile } },
  highest: { fields: { highest: name, ...window, ...quantile } },
  share: { fields: { share: name, ...crossed, ...window, ...quantile }, oneOf: oneLevel },
  time: { fields: { time: name, ...crossed, ...quantile }, oneOf: oneLevel },
  probability: { fields: { probability: name, ...crossed, ...window }, oneOf: oneLevel },
  parameter: {
    fields: { parameter: required(nameOf("parameter", "r"), "Parameter of the rule") },
  },
};

export const measure: Value<Measure> = {
  kind: { is: "measures", of: kinds },
  example: '{ time: "N", risesTo: 90 }',
};

const aim = either(anyNumber, text("2027-12", "the label of a period"));

export const target: Value<SolveOptions["until"]> = {
  kind: {
    is: "measures",
    of: kinds,
    also: {
      fields: {
        is: optional(aim, "Value that the measure must have, or the period of a time by its label"),
        atMost: optional(aim, "Largest value that the measure may have, or latest period of a time"),
        atLeast: optional(aim, "Smallest value that the measure may have, or earliest period of a time"),
      },
      oneOf: [["is", "atMost", "atLeast"]],
    },
  },
  example: '{ time: "N", risesTo: 90, is: 24 }',
};
