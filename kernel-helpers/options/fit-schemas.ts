import type { BootstrapOptions, FitOptions, GridIntervalOptions } from "../../src/estimate/index.js";
import { keptResamples } from "./call-sizes.js";
import {
  firstValues,
  fit as fitted,
  intervalLevel,
  limitsByName,
  observations,
  onProgress,
  rule,
  seed,
  signal,
  valuesByName,
} from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  either,
  flag,
  named,
  number,
  oneOf,
  optional,
  required,
  type Schema,
  text,
  whole,
} from "./option.js";

export const fitOptions: Schema<FitOptions> = {
  errors: required(
    oneOf("process", "observation", "both"),
    "Where the error lies: in the steps of the rule, in the observation of a value, or in both; it has no default, because a fit states what it assumes",
  ),
  distribution: optional(
    oneOf("normal", "lognormal", "poisson", "negative-binomial"),
    "Distribution of the errors: equal scatter at every level, normal on the log scale, or counts",
    '"normal"',
  ),
  sd: optional(
    either(number({ from: 0 }, 0.1), text("sd", "the name of an input column")),
    'Standard deviation of the errors of a single reading where it is known, one number or the name of an input column that holds one for every row: in the record\'s unit for "normal", on the log scale for "lognormal" (0.1 for a coefficient of variation of 10%); with `errors: "both"` that of the observation',
  ),
  fixed: optional(valuesByName("parameter"), "Parameters held at a value, by name"),
  bounds: optional(
    limitsByName("free"),
    'Lowest and highest admitted value, by parameter or by initial state ("N[0]")',
  ),
  start: optional(
    valuesByName("free"),
    "Where the search begins, by parameter or initial state; what is not named is found from the record",
  ),
  initial: optional(
    firstValues,
    'Initial states that are known exactly, by state (oldest first where the rule reads past values); otherwise a trajectory fit estimates them; with `errors: "both"` the filter begins there, without error',
  ),
  factor: optional(
    named(text("q"), '{ B: "q" }', "state"),
    'By state: the name of an unknown factor by which the record reads it, as `{ B: "q" }` for recorded = q * B',
  ),
  robust: optional(
    flag,
    "Whether values far off the rule count for less (Huber's weights), in fits by least squares",
    "false",
  ),
  groups: optional(
    oneOf("separate", "combined", "mixed"),
    "Each group on its own, the same parameters for all, or parameters that vary among them",
    '"separate"',
  ),
  intervals: optional(
    oneOf("profile", "none"),
    "Intervals by profile likelihood, or none where many fits are made and only estimates are wanted",
    '"profile"',
  ),
  level: intervalLevel,
  cut: optional(
    oneOf("F", "chi-square"),
    "Cut of the profile: small-sample F, or chi-square with sigma^2 = RSS/n",
    '"F"',
  ),
};

const fitSchema: FunctionSchema = {
  name: "fit",
  takes: [rule, observations],
  options: { fields: fitOptions },
  example: 'fit(rule, observations, { errors: "observation" })',
};

const bootstrapOptions: Schema<BootstrapOptions> = {
  errors: optional(
    oneOf("parametric", "residual", "block"),
    "Errors of the simulated records: normal, the fit's own residuals one by one, or in blocks of neighbours",
    '"parametric"',
  ),
  block: optional(whole(1, 4), "Length of a block", "the cube root of the number of values, rounded up"),
  resamples: optional(whole(20, 999), "Refits a group", 999),
  seed,
  level: optional(intervalLevel, "Confidence level of the intervals, between 0 and 1", "that of the fit"),
  onProgress,
  signal,
};

const bootstrapSchema: FunctionSchema = {
  name: "bootstrap",
  takes: [fitted],
  options: { fields: bootstrapOptions },
  example: "bootstrap(fit, { resamples: 999 })",
  sizes: [keptResamples],
};

const gridIntervalOptions: Schema<GridIntervalOptions> = {
  group: optional(text("A", "the name of a group"), "Group of the fit", "its only one"),
  resamples: optional(whole(20, 399), "Simulated records at every value tried", 399),
  seed,
  level: optional(intervalLevel, "Confidence level of the interval, between 0 and 1", "that of the fit"),
  onProgress,
  signal,
};

const gridIntervalSchema: FunctionSchema = {
  name: "gridInterval",
  takes: [fitted, { name: "name", takes: text("r", "the name of a parameter of the fit") }],
  options: { fields: gridIntervalOptions },
  example: 'gridInterval(fit, "r", { resamples: 399 })',
};

const updateFitSchema: FunctionSchema = {
  name: "updateFit",
  takes: [
    { ...fitted, name: "before" },
    { ...observations, name: "later" },
  ],
  example: "updateFit(fit, laterObservations)",
};

const estimatesSchema: FunctionSchema = {
  name: "estimates",
  takes: [fitted],
  example: "estimates(fit)",
};
const pointsSchema: FunctionSchema = { name: "points", takes: [fitted], example: "points(fit)" };
const summarySchema: FunctionSchema = { name: "summary", takes: [fitted], example: "summary(fit)" };

const saveResultSchema: FunctionSchema = {
  name: "saveResult",
  takes: [{ name: "result", takes: ["fit", "forecast"] }],
  example: "saveResult(fit)",
};

const loadResultSchema: FunctionSchema = {
  name: "loadResult",
  takes: [
    { name: "text", takes: text('{"format": "periodwise result"}', "the text that `saveResult` wrote") },
  ],
  example: "loadResult(saveResult(fit))",
};

export const fitSchemas: readonly FunctionSchema[] = [
  saveResultSchema,
  loadResultSchema,
  fitSchema,
  bootstrapSchema,
  gridIntervalSchema,
  updateFitSchema,
  estimatesSchema,
  pointsSchema,
  summarySchema,
];
