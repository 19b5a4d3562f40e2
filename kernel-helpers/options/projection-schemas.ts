import type {
  ForecastOptions,
  InputPlan,
  Noise,
  Scenarios,
  SimulateOptions,
  Watch,
} from "../../src/projection/index.js";
import type { ProcessNoise } from "../../src/rule/index.js";
import { projectedPaths, projectedPeriods } from "./call-sizes.js";
import {
  anyNumber,
  firstValues,
  fit,
  onProgress,
  rule,
  seed,
  share,
  signal,
  valuesByName,
} from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  either,
  type Fields,
  listOf,
  named,
  number,
  numbers,
  oneOf,
  optional,
  required,
  type Schema,
  shapeOf,
  text,
  type Value,
  whole,
} from "./option.js";

const byPeriod = (example: string): Value<Readonly<Record<number, number>>> =>
  named(anyNumber, example) as Value<Readonly<Record<number, number>>>;

const planFields: Schema<Extract<InputPlan, { readonly usual: number }>> = {
  usual: required(anyNumber, "Level in every period that nothing else is said of"),
  from: optional(byPeriod("{ 13: 450 }"), "Levels that hold from a period on, by its number"),
  at: optional(byPeriod("{ 20: 0 }"), "Levels of single periods, by their number"),
};

const plan: Value<InputPlan> = either(
  either(anyNumber, numbers("[300, 300, 450]")),
  shapeOf(planFields, "{ usual: 300, from: { 13: 450 } }"),
);

export const plans: Value<Readonly<Record<string, InputPlan>>> = named(plan, "{ payment: 300 }");

const scenarios: Value<Scenarios> = named(plans, "{ usual: { payment: 300 }, more: { payment: 450 } }");

const sd = required(number({ from: 0 }, 0.1), "Standard deviation a period");
const centre = optional(oneOf("median", "mean"), "Whether the factor has median 1 or mean 1", '"median"');

const noiseFields: Readonly<Record<Noise["distribution"], Fields>> = {
  normal: { sd },
  lognormal: { sd, centre },
  poisson: {},
  "negative-binomial": { size: required(number({ above: 0 }, 5), "Variance is m + m^2/size at mean m") },
  demographic: { variance: required(number({ from: 0 }, 1), "Variance of a single individual") },
};

const noiseExample = '{ N: { distribution: "lognormal", sd: 0.1 } }';

/** The error of a single value. */
const error: Value<Noise> = {
  kind: { is: "variants", by: "distribution", of: noiseFields },
  example: '{ distribution: "lognormal", sd: 0.1 }',
};

const namedSd = required(
  either(number({ from: 0 }, 0.1), text("s")),
  "Standard deviation a period: a number or the name of a parameter",
);

/** Random change of a rule, whose standard deviation may be one of its parameters. */
export const processNoise: Value<Readonly<Record<string, ProcessNoise>>> = named(
  {
    kind: {
      is: "variants",
      by: "distribution",
      of: { normal: { sd: namedSd, centre }, lognormal: { sd: namedSd, centre } },
    },
    example: '{ distribution: "lognormal", sd: 0.1 }',
  },
  noiseExample,
);

export const noise: Value<Readonly<Record<string, Noise | ProcessNoise>>> = named(
  {
    kind: {
      is: "variants",
      by: "distribution",
      of: { ...noiseFields, normal: { sd: namedSd, centre }, lognormal: { sd: namedSd, centre } },
    },
    example: '{ distribution: "lognormal", sd: 0.1 }',
  },
  noiseExample,
);

const watched: Schema<Watch> = {
  state: optional(text("N"), "Name of the state", "the only one"),
  risesTo: optional(anyNumber, "Level that the state rises to, from below, in its unit"),
  fallsTo: optional(anyNumber, "Level that the state falls to, from above, in its unit"),
};

const levels = optional(
  listOf(share, "[0.5, 0.8, 0.95]"),
  "Levels of the bands, each between 0 and 1",
  "[0.5, 0.8, 0.95]",
);
const watch = optional(
  listOf(shapeOf(watched, '{ state: "N", fallsTo: 0 }')),
  "Levels whose first passage is followed, for runs with more paths than can be kept",
);
const scenarioOption = optional(
  scenarios,
  "Several plans of inputs side by side, by the name of the scenario, run with the same random numbers",
);

const forecastOptions: Schema<ForecastOptions> = {
  periods: required(whole(1, 12), "Whole periods beyond the last recorded one"),
  inputs: optional(
    plans,
    "By input: its plan; needed for every input of the rule, the first period ahead first",
  ),
  scenarios: scenarioOption,
  levels,
  paths: optional(whole(1, 4000), "Random paths", 4000),
  seed,
  watch,
  onProgress,
  signal,
};

const forecastSchema: FunctionSchema = {
  name: "forecast",
  takes: [fit],
  options: { fields: forecastOptions },
  example: "forecast(fit, { periods: 12 })",
  sizes: [projectedPeriods, projectedPaths],
};

const simulateOptions: Schema<SimulateOptions> = {
  parameters: optional(valuesByName, "Parameters by name; those that the rule holds fixed may be left out"),
  initial: optional(
    firstValues,
    "First values by state, with lags a list, oldest first; those that the rule states may be left out",
  ),
  periods: required(whole(1, 12), "Whole periods to run"),
  inputs: optional(plans, "By input: its plan, period 0 first"),
  scenarios: scenarioOption,
  noise: optional(noise, "By state: the random change of each period", "what the rule says"),
  observationNoise: optional(
    named(error, noiseExample),
    "By state: the observation error, which is reported and not carried on",
  ),
  period: optional(text("month"), 'What a period is called, as in "month"', '"period"'),
  startsAt: optional(
    number({ whole: true }, 0),
    "What the first period is numbered, as the last recorded month is",
    0,
  ),
  paths: optional(whole(1, 4000), "Random paths", "4000, or 1 where nothing is random"),
  levels,
  seed,
  watch,
  onProgress,
  signal,
};

const simulateSchema: FunctionSchema = {
  name: "simulate",
  takes: [rule],
  options: { fields: simulateOptions },
  example: "simulate(rule, { parameters: { R: 1.1 }, initial: { N: 100 }, periods: 12 })",
  sizes: [projectedPeriods, projectedPaths],
};

export const projectionSchemas: readonly FunctionSchema[] = [forecastSchema, simulateSchema];
