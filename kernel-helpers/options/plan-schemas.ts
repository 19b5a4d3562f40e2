import type { InputPlan, InputPlans, StartOptions } from "../../src/dynamics/index.js";
import { anyNumber } from "./common-options.js";
import {
  either,
  named,
  numbers,
  optional,
  required,
  resultOf,
  type Schema,
  shapeOf,
  text,
  type Value,
} from "./option.js";
import { stepLength } from "./record-schemas.js";

type LevelPlan = Exclude<InputPlan, { readonly byGroup: unknown }>;

const usualFields: Schema<Extract<LevelPlan, { readonly usual: number }>> = {
  usual: required(anyNumber, "Level in every period that nothing else is said of"),
  from: optional(
    named(anyNumber, '{ "2027-07": 450 }'),
    "Levels that hold from a period on, by its label or number",
  ),
  at: optional(named(anyNumber, '{ "2027-12": 0 }'), "Levels of single periods, by their labels or numbers"),
};

const levelPlan: Value<LevelPlan> = either(
  either(anyNumber, numbers("[300, 300, 450]")),
  shapeOf(usualFields, '{ usual: 300, at: { "2027-12": 0 } }'),
);

const groupFields: Schema<Extract<InputPlan, { readonly byGroup: unknown }>> = {
  byGroup: required(named(levelPlan, "{ A: 100, B: 300 }"), "One plan a group, by its name"),
};

const plan: Value<InputPlan> = either(levelPlan, shapeOf(groupFields, "{ byGroup: { A: 100, B: 300 } }"));

export const plans: Value<InputPlans> = named(plan, "{ payment: 300 }", "input");

/** Where a run of a rule begins. */
export const startOptions: Schema<StartOptions> = {
  startsAt: optional(
    either(anyNumber, text("2026-03-31", "the label of a period")),
    'The first period: a number, a label such as "2026-03-31" where `period` names a unit of time, or a period of the record',
    "the last recorded one, else 0",
  ),
  period: optional(
    either(text("month", "a unit of time"), shapeOf(stepLength, '{ every: 12, of: "hour" }')),
    'What a period is: "month", or a step such as `{ every: 12, of: "hour" }`',
    '"period"',
  ),
  record: optional(
    either(
      resultOf<Exclude<StartOptions["record"], undefined>>("observations", "observations"),
      resultOf<Exclude<StartOptions["record"], undefined>>("fit", "fit"),
    ),
    "A record (or a fit) to go on from: its dates, its inputs so far, and its last values where `initial` has none",
  ),
  group: optional(text("A", "the name of a group"), "Of a fit or a record with several groups: which one"),
};
