import type { Fit } from "../../src/estimate/index.js";
import type {
  ChangePointOptions,
  CheckOptions,
  CompareOptions,
  DensityOptions,
  ProposeOptions,
} from "../../src/evidence/index.js";
import { fit, observations, onProgress, rule, seed, share, signal } from "./common-options.js";
import { fitOptions } from "./fit-schemas.js";
import type { FunctionSchema } from "./function-schema.js";
import { func, nameOf, number, oneOf, optional, type Schema, whole } from "./option.js";

const { errors, intervals, ...ofFits } = fitOptions;

const checkOptions: Schema<CheckOptions> = {
  resamples: optional(
    whole(50, 200, 10_000_000),
    "Records drawn from the fit and refitted, at least 50",
    200,
  ),
  seed,
  onProgress,
  signal,
};

const checkSchema: FunctionSchema = {
  name: "check",
  takes: [fit],
  options: { fields: checkOptions },
  example: "check(fit, { resamples: 200 })",
};

const compareOptions: Schema<CompareOptions> = {
  origins: optional(
    whole(1, 12, 100_000),
    "Rows from which each rival is fitted afresh and carried forward",
    "a third of the record, 12 at most",
  ),
  periods: optional(whole(1, 4, 100_000), "Periods forecast from each", "a tenth of the record"),
  level: optional(share, "Confidence level of the forecasts' intervals, between 0 and 1", 0.8),
  decide: optional(
    func<(fit: Fit) => string>("(fit) => forecastAndSay(fit)"),
    "What the client would be told by a fit; where rivals are not told apart, what each says is set side by side",
  ),
  onProgress,
  signal,
};

const compareSchema: FunctionSchema = {
  name: "compare",
  takes: [{ name: "fits", takes: ["fits"] }],
  options: { fields: compareOptions },
  example: "compare([first, second], { periods: 4 })",
};

const proposeOptions: Schema<ProposeOptions> = {
  ...ofFits,
  state: optional(nameOf("state", "N"), "Name of the state", "the only one"),
  errors: optional(
    oneOf("process", "observation"),
    "Where the error lies; without it both are tried, and the record says which, or that it cannot",
  ),
  seed,
  onProgress,
  signal,
};

const proposeSchema: FunctionSchema = {
  name: "propose",
  takes: [observations],
  options: { fields: proposeOptions },
  example: 'propose(observations, { distribution: "lognormal" })',
};

const changePointOptions: Schema<ChangePointOptions> = {
  ...ofFits,
  distribution: optional(
    oneOf("normal", "lognormal"),
    "Normal errors on the natural or on the log scale; counts are not searched for a break",
    '"normal"',
  ),
  leastShare: optional(
    number({ above: 0, below: 0.5 }, 0.15),
    "Least share of the record on either side of a break, between 0 and 0.5",
    0.15,
  ),
  resamples: optional(
    whole(19, 399, 10_000_000),
    "Records without a break that the largest F is held against; with 399 a test at 5% is exact",
    399,
  ),
  seed,
  onProgress,
  signal,
};

const changePointSchema: FunctionSchema = {
  name: "changePoint",
  takes: [rule, observations],
  options: { fields: changePointOptions },
  example: "changePoint(rule, observations, { resamples: 399 })",
};

const densityOptions: Schema<DensityOptions> = {
  state: optional(nameOf("state", "N"), "Name of the state", "the only one"),
  resamples: optional(whole(19, 1999, 10_000_000), "Records drawn without density dependence", 1999),
  seed,
  level: optional(
    share,
    "Confidence above which density dependence is called, between 0 and 1; 0.95 is a test at 5%",
    0.95,
  ),
  onProgress,
  signal,
};

const densityDependenceSchema: FunctionSchema = {
  name: "densityDependence",
  takes: [observations],
  options: { fields: densityOptions },
  example: "densityDependence(observations, { level: 0.95 })",
};

const sameParametersSchema: FunctionSchema = {
  name: "sameParameters",
  takes: [fit],
  example: "sameParameters(fit)",
};

export const evidenceSchemas: readonly FunctionSchema[] = [
  sameParametersSchema,
  checkSchema,
  compareSchema,
  proposeSchema,
  changePointSchema,
  densityDependenceSchema,
];
