import type { RecurrenceOptions, RuleCatalogue } from "../../src/rule/index.js";
import { boundsByName, firstValue, valuesByName } from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  either,
  type Fields,
  listOf,
  named,
  oneOf,
  optional,
  pairOf,
  required,
  type Schema,
  text,
  whole,
} from "./option.js";
import { processNoise } from "./projection-schemas.js";

type NamedRuleOptions = Omit<RecurrenceOptions, "parameters">;
/** Options of one rule of the catalogue besides those of all. */
type OwnOptions<Name extends keyof RuleCatalogue> = Omit<
  NonNullable<Parameters<RuleCatalogue[Name]>[0]>,
  keyof NamedRuleOptions
>;
type WithOwn =
  | "inventory"
  | "gapCorrection"
  | "delayedDensity"
  | "adultsAndRecruits"
  | "ages"
  | "stages"
  | "perishable";

const names = listOf(text("C"), '["C"]', 0);

const namedRuleOptions: Schema<NamedRuleOptions> = {
  name: optional(
    text("crowding"),
    "Name of the rule in titles, tables and sentences",
    "its text, or its name in the catalogue",
  ),
  inputs: optional(
    names,
    "Names that are recorded by period, as columns of the record; only inputs can be read at [t+1]",
  ),
  units: optional(named(text("EUR"), '{ owed: "EUR" }'), "Unit by name"),
  bounds: optional(
    boundsByName,
    'Lower and upper bound by state or parameter, as in { K: [0, Infinity] }; for a state also what happens there, { N: { range: [0, 500], atBounds: "error" } }',
    "a state is absorbed at a lower bound of 0 (it stays 0), and any other bound is an error of the rule, at which a path ends",
  ),
  start: optional(valuesByName(), "Starting value of a fit, by parameter"),
  fixed: optional(valuesByName(), "Parameters held at a value in every fit, by name"),
  initial: optional(
    named(either(firstValue, oneOf("estimated")), "{ N: 10 }"),
    'By state: its first value, its first values oldest first where the rule reads past ones, or "estimated"',
  ),
  noise: optional(processNoise, "By state: random change added in every period"),
};

const recurrenceOptions: Schema<RecurrenceOptions> = {
  ...namedRuleOptions,
  parameters: optional(names, "All parameters; any other free name is then an error", "every free name"),
};

const recurrenceSchema: FunctionSchema = {
  name: "recurrence",
  takes: [{ name: "text", takes: text("N[t+1] = R*N", "the text of a rule") }],
  options: { fields: recurrenceOptions },
  example: 'recurrence("N[t+1] = R*N", { units: { N: "cells" } })',
};

const lag = required(whole(0, 2, 1000), "Delay in whole periods");

const ownOptions: { readonly [Name in WithOwn]: Schema<OwnOptions<Name>> } = {
  inventory: { lag },
  gapCorrection: { lag },
  delayedDensity: { lag },
  adultsAndRecruits: {
    lag,
    recruits: optional(
      oneOf("rising", "humped"),
      "Whether more adults always mean more recruits, or too many mean fewer",
      '"rising"',
    ),
  },
  ages: { ages: required(whole(2, 3, 200), "Number of age classes") },
  stages: {
    stages: required(listOf(text("seed"), '["seed", "plant"]', 2), "Names of the stages"),
    moves: optional(
      listOf(pairOf(text("seed"), '["seed", "plant"]')),
      "Moves that may happen, as pairs [from, to]",
      "every pair",
    ),
  },
  perishable: {
    life: required(whole(1, 5, 200), "Periods that goods last"),
    issue: optional(
      oneOf("oldest-first", "newest-first"),
      "Which goods are given out first",
      '"oldest-first"',
    ),
  },
};

/** The schema of a rule of the catalogue. */
export function catalogueSchema(name: string): FunctionSchema {
  const own = (ownOptions as Readonly<Record<string, Fields>>)[name] ?? {};
  const needed = Object.entries(own).filter(([, { need }]) => need === "required");
  const shown = needed.map(([option, { example }]) => `${option}: ${example}`).join(", ");
  return {
    name: `rules.${name}`,
    takes: [],
    options: { fields: { ...own, ...namedRuleOptions } },
    example: `rules.${name}(${shown === "" ? "" : `{ ${shown} }`})`,
  };
}

export const ruleSchemas: readonly FunctionSchema[] = [recurrenceSchema];
