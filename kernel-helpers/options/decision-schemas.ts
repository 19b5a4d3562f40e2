import type {
  NextReadingOptions,
  OptimizeOptions,
  SensitivityOptions,
  SolveOptions,
  TimeToReachOptions,
  TradeoffOptions,
} from "../../src/decision/index.js";
import { projectedPaths, steppedPeriods } from "./call-sizes.js";
import {
  anyNumber,
  firstValues,
  intervalLevel,
  onProgress,
  pair,
  positive,
  ruleOrFit,
  seed,
  signal,
  valuesByName,
} from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import { crossed, measure, oneLevel, target } from "./measure-schemas.js";
import {
  either,
  flag,
  func,
  listOf,
  named,
  nameOf,
  only,
  optional,
  required,
  type Schema,
  shapeOf,
  text,
  whole,
} from "./option.js";
import { plans, startOptions } from "./plan-schemas.js";
import { noise } from "./projection-schemas.js";

type Shared = Omit<SensitivityOptions, "answer" | "vary">;

const shared: Schema<Shared> = {
  startsAt: only("rule", startOptions.startsAt),
  period: only("rule", startOptions.period),
  record: only("rule", startOptions.record),
  group: startOptions.group,
  periods: required(whole(1, 24), "Whole periods ahead"),
  inputs: optional(plans, "By input: what it will be, by the periods of the record or of the run"),
  parameters: only("rule", optional(valuesByName("parameter"), "Of a rule: its parameters by name")),
  initial: only("rule", optional(firstValues, "Of a rule: its first values by state")),
  noise: only(
    "rule",
    optional(
      noise,
      "Of a rule: random change by state; every measure is then one of the paths' distribution",
    ),
  ),
  paths: optional(whole(1, 4000), "Random paths where chance has a part", 4000),
  seed,
  onProgress,
  signal,
};

const sizes = [steppedPeriods, projectedPaths];

const vary = required(
  nameOf("varied", "r"),
  'What is varied: a parameter, a first value such as "N[0]", or an input, whose usual level is set',
);

const solveOptions: Schema<SolveOptions> = {
  ...shared,
  vary,
  until: required(target, "What is to be met: a measure that `is` a value, is `atMost` it or `atLeast` it"),
  range: optional(
    pair,
    "Lowest and highest value looked at",
    "a hundredth to a hundred times the present one, within its bounds",
  ),
  multiple: optional(
    positive,
    "The value comes in multiples of this (0.01 for money, 1 for pieces); with `atMost` and `atLeast` only they are tried, with `is` the nearest is given",
  ),
  level: intervalLevel,
};

const solveForSchema: FunctionSchema = {
  name: "solveFor",
  takes: [ruleOrFit],
  options: { fields: solveOptions },
  example: 'solveFor(fit, { vary: "r", until: { time: "N", risesTo: 90, is: 24 }, periods: 36 })',
  sizes,
};

const optimizeOptions: Schema<OptimizeOptions> = {
  ...shared,
  vary,
  range: required(pair, "Lowest and highest value looked at"),
  maximize: optional(measure, "Measure that is to be as large as can be; give this or `minimize`"),
  minimize: optional(measure, "Measure that is to be as small as can be; give this or `maximize`"),
  multiple: optional(positive, "The value comes in multiples of this (1 for pieces); only they are tried"),
  level: intervalLevel,
};

const optimizeSchema: FunctionSchema = {
  name: "optimize",
  takes: [ruleOrFit],
  options: { fields: optimizeOptions, oneOf: [["maximize", "minimize"]] },
  example: 'optimize(fit, { vary: "r", range: [0.1, 1], maximize: { total: "N" }, periods: 20 })',
  sizes,
};

const sensitivityOptions: Schema<SensitivityOptions> = {
  ...shared,
  answer: required(measure, "Measure whose change is wanted"),
  vary: optional(
    listOf(nameOf("varied", "r"), '["r", "K"]'),
    "Parameters, first values and inputs to move",
    "what the fit estimates, or all parameters of a rule",
  ),
};

const sensitivitySchema: FunctionSchema = {
  name: "sensitivity",
  takes: [ruleOrFit],
  options: { fields: sensitivityOptions },
  example: 'sensitivity(fit, { answer: { time: "N", risesTo: 120 }, periods: 20 })',
  sizes,
};

const periodLabel = either(anyNumber, text("2027-12", "the label of a period"));

const ends = {
  from: required(anyNumber, "First value"),
  to: required(anyNumber, "Last value"),
};

const tradeoffOptions: Schema<TradeoffOptions> = {
  ...shared,
  vary,
  values: required(
    either(
      listOf(anyNumber, "[10, 20, 30]"),
      shapeOf<{ readonly from: number; readonly to: number; readonly count: number }>(
        { ...ends, count: required(whole(1, 5, 100_000), "How many values, ends included") },
        "{ from: 10, to: 30, count: 5 }",
      ),
    ),
    "Values to look at: a list, or two ends with how many",
  ),
  answers: required(
    named(measure, '{ low: { lowest: "N" } }'),
    "What each value brings: measures by the name they are shown under",
  ),
};

const tradeoffSchema: FunctionSchema = {
  name: "tradeoff",
  takes: [ruleOrFit],
  options: { fields: tradeoffOptions },
  example: 'tradeoff(fit, { vary: "r", values: [0.1, 0.2], answers: { low: { lowest: "N" } }, periods: 20 })',
  sizes,
};

const timeToReachOptions: Schema<TimeToReachOptions> = {
  state: optional(nameOf("measured", "N"), "Name of a state or quantity", "the first state"),
  ...crossed,
  level: intervalLevel,
  newUnit: optional(
    flag,
    "Whether to say as well when a new unit would get there, the variance between units added; from three groups on",
    "false",
  ),
};

const timeToReachSchema: FunctionSchema = {
  name: "timeToReach",
  takes: [{ name: "ahead", takes: ["forecast", "simulation"] }],
  options: { fields: timeToReachOptions, oneOf: oneLevel },
  example: "timeToReach(forecast(fit, { periods: 24 }), { risesTo: 120 })",
};

const nextReadingOptions: Schema<NextReadingOptions> = {
  periods: required(
    whole(1, 10),
    "Periods beyond the record up to which a reading could be taken, and up to which the answer looks",
  ),
  values: optional(
    either(
      listOf(periodLabel, "[21, 24]"),
      shapeOf<{ readonly from: number | string; readonly to: number | string }>(
        {
          from: required(periodLabel, "First period, by number or label"),
          to: required(periodLabel, "Last period, by number or label"),
        },
        "{ from: 20, to: 30 }",
      ),
    ),
    "Periods at which it could be taken, by number or label: a list, or two ends; those within the record only where they are given, as for samples that were kept",
    "every period after the record",
  ),
  answer: optional(measure, "Measure whose margin is to be narrowed; needed for a single fit"),
  state: optional(nameOf("state", "N"), "What is read", "the first state"),
  replicates: optional(
    whole(1, 1, 1_000_000),
    "Readings taken at the same time; they count where the error is one of observation",
    1,
  ),
  cost: optional(
    func<(time: number) => number>("(time) => 10 + time"),
    "Cost of a reading at a time, in any unit; the gain is then weighed by it",
    "the same everywhere",
  ),
  group: startOptions.group,
  paths: optional(whole(1, 1000), "Parameter values drawn", 1000),
  seed,
  onProgress,
  signal,
};

const nextReadingSchema: FunctionSchema = {
  name: "nextReading",
  takes: [{ name: "fits", takes: ["fit", "fits"] }],
  options: { fields: nextReadingOptions },
  example: 'nextReading(fit, { answer: { parameter: "K" }, periods: 10 })',
};

export const decisionSchemas: readonly FunctionSchema[] = [
  solveForSchema,
  optimizeSchema,
  sensitivitySchema,
  tradeoffSchema,
  timeToReachSchema,
  nextReadingSchema,
];
