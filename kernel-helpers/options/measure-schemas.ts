import type { Measure, SolveOptions } from "../../src/decision/index.js";
import { anyNumber, share } from "./common-options.js";
import { crossed, oneLevel } from "./level-schemas.js";
import {
  either,
  type Fields,
  nameOf,
  number,
  optional,
  required,
  type Shape,
  text,
  type Value,
  whole,
} from "./option.js";

type MeasureKind = Measure extends infer Each ? (Each extends unknown ? keyof Each : never) : never;

/** What a measure is taken of. */
const name = required(nameOf("measured", "N"), "State or quantity that is measured");

const window: Fields = {
  from: optional(whole(1, 1), "First period of the window, counted from the present", 1),
  to: optional(whole(1, 12), "Last period of the window, counted from the present", "the last one"),
};

const quantile = optional(
  share,
  "Which quantile of the paths is taken instead of their mean (of a time: instead of the median)",
  "none",
);

/** By the field that names it: what else a measure has. */
const kinds: Readonly<
  Record<Exclude<MeasureKind, "at" | "from" | "to" | "risesTo" | "fallsTo" | "quantile">, Shape>
> = {
  level: {
    fields: { level: name, at: required(number({ from: 0, whole: true }, 12), "Periods ahead"), quantile },
  },
  average: { fields: { average: name, ...window, quantile } },
  total: { fields: { total: name, ...window, quantile } },
  lowest: { fields: { lowest: name, ...window, quantile } },
  highest: { fields: { highest: name, ...window, quantile } },
  share: { fields: { share: name, ...crossed, ...window, quantile }, oneOf: oneLevel },
  time: { fields: { time: name, ...crossed, quantile }, oneOf: oneLevel },
  probability: { fields: { probability: name, ...crossed, ...window }, oneOf: oneLevel },
  parameter: { fields: { parameter: required(nameOf("parameter", "r"), "Parameter of the rule") } },
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
