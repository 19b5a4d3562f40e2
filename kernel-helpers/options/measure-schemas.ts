import type { Measure, SolveOptions } from "../../src/decision/index.js";
import { anyNumber } from "./common-options.js";
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

const crossed: Fields = {
  risesTo: optional(anyNumber, "Level that the state rises to, from below, in its unit"),
  fallsTo: optional(anyNumber, "Level that the state falls to, from above, in its unit"),
};

const oneLevel = [["risesTo", "fallsTo"]];

/** By the field that names it: what else a measure has. */
const kinds: Readonly<Record<Exclude<MeasureKind, "at" | "from" | "to" | "risesTo" | "fallsTo">, Shape>> = {
  level: {
    fields: { level: name, at: required(number({ from: 0, whole: true }, 12), "Periods ahead") },
  },
  average: { fields: { average: name, ...window } },
  total: { fields: { total: name, ...window } },
  lowest: { fields: { lowest: name, ...window } },
  highest: { fields: { highest: name, ...window } },
  time: { fields: { time: name, ...crossed }, oneOf: oneLevel },
  probability: { fields: { probability: name, ...crossed }, oneOf: oneLevel },
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
