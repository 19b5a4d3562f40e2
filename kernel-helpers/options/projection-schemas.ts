import type {
  ForecastOptions,
  Noise,
  Scenarios,
  SimulateOptions,
  Watch,
} from "../../src/projection/index.js";
import type { ProcessNoise } from "../../src/rule/index.js";
import { projectedPaths, projectedPeriods } from "./call-sizes.js";
import { firstValues, fit, onProgress, rule, seed, share, signal, valuesByName } from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import { crossed, oneLevel } from "./measure-schemas.js";
import {
  either,
  type Fields,
  listOf,
  named,
  nameOf,
  number,
  oneOf,
  optional,
  required,
  type Schema,
  shapeOf,
  text,
  type Value,
  whole,
} from "./option.js";
import { plans, startOptions } from "./plan-schemas.js";

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
  either(number({ from: 0 }, 0.1), text("s", "the name of a parameter")),
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
  "state",
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
  "state",
);

const watched: Schema<Watch> = {
  state: optional(nameOf("measured", "N"), "Name of a state or quantity", "the first state"),
  ...crossed,
};

const levels = optional(
  listOf(share, "[0.5, 0.8, 0.95]"),
  "Levels of the bands, each between 0 and 1",
  "[0.5, 0.8, 0.95]",
);
const watch = optional(
  listOf(shapeOf(watched, '{ state: "N", fallsTo: 0 }', oneLevel)),
  "Levels whose first passage is followed, for runs with more paths than can be kept",
);
const scenarioOption = optional(
  scenarios,
  "Several plans of inputs side by side, by the name of the scenario, run with the same random numbers",
);

const label = either(text("2026-06", "the label of a period"), number({}, 28));

const forecastOptions: Schema<ForecastOptions> = {
  periods: required(whole(1, 12), "Whole periods beyond the last recorded one"),
  from: optional(
    either(
      label,
      shapeOf<Extract<NonNullable<ForecastOptions["from"]>, object>>(
        { byGroup: required(named(label, '{ A: "2026-06" }'), "One a group") },
        '{ byGroup: { A: "2026-06" } }',
      ),
    ),
    "The recorded period to start after, by its label or number, or one a group",
    "the last one",
  ),
  inputs: optional(
    plans,
    "By input: what it will be, by the periods of the record, or one plan a group; needed for every input that the record does not hold so far ahead",
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
  ...startOptions,
  parameters: optional(
    valuesByName("parameter"),
    "Parameters by name; those that the rule holds fixed may be left out",
  ),
  initial: optional(
    firstValues,
    "First values by state, with lags a list, oldest first; those that the rule states may be left out",
  ),
  periods: required(whole(1, 12), "Whole periods to run"),
  inputs: optional(plans, "By input: what it will be, from the first period on"),
  scenarios: scenarioOption,
  noise: optional(noise, "By state: the random change of each period", "what the rule says"),
  observationNoise: optional(
    named(error, noiseExample, "state"),
    "By state: the error of an observation, reported and not carried on",
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
  example: "simulate(rule, { parameters: { r: 0.5, K: 100 }, initial: { N: 10 }, periods: 12 })",
  sizes: [projectedPeriods, projectedPaths],
};

export const projectionSchemas: readonly FunctionSchema[] = [forecastSchema, simulateSchema];
