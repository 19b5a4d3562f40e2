import type {
  AttractorOptions,
  BasinsOptions,
  BifurcationsOptions,
  ClosedFormOptions,
  CobwebOptions,
  CyclesOptions,
  EquilibriaOptions,
  ExactTrajectoryOptions,
  ExactValue,
  HeldSetting,
  LyapunovExponentOptions,
  PredictionHorizonOptions,
  SearchRange,
  TrajectoryOptions,
} from "../../src/dynamics/index.js";
import { exactPeriods, steppedPeriods } from "./call-sizes.js";
import {
  anyNumber,
  firstValues,
  intervalLevel,
  onProgress,
  pair,
  positive,
  ruleOrFit,
  signal,
  valuesByName,
} from "./common-options.js";
import type { FunctionSchema } from "./function-schema.js";
import {
  either,
  listOf,
  named,
  nameOf,
  only,
  optional,
  required,
  type Schema,
  shapeOf,
  text,
  type Value,
  whole,
} from "./option.js";
import { plans, startOptions } from "./plan-schemas.js";

const takes = [ruleOrFit];

/** What questions take of a fit besides the options of a rule. */
interface OfFit {
  readonly group?: string;
}

const group = only(
  "fit",
  optional(text("A", "the name of a group"), "Of a fit with several groups: which one"),
);

const held: Schema<HeldSetting & OfFit> = {
  parameters: optional(
    valuesByName("parameter"),
    "Parameters by name; those that the rule holds fixed may be left out, and those of a fit are its estimates",
  ),
  inputs: optional(valuesByName("input"), "By input: the value at which it stays"),
  group,
};

const initial = optional(
  firstValues,
  "First values by state, with lags a list, oldest first; those that the rule states or the fit estimates may be left out",
);

const trajectoryOptions: Schema<TrajectoryOptions> = {
  ...startOptions,
  parameters: held.parameters,
  initial,
  periods: required(whole(0, 12), "Whole periods to run"),
  inputs: optional(plans, "By input: what it will be, from the first period on"),
};

const trajectorySchema: FunctionSchema = {
  name: "trajectory",
  takes,
  options: { fields: trajectoryOptions },
  example: "trajectory(rule, { parameters: { r: 0.5, K: 100 }, initial: { N: 10 }, periods: 12 })",
  sizes: [steppedPeriods],
};

const exactly: Value<ExactValue> = either(
  either(anyNumber, text("1/3", 'a number or a text such as "1/3"')),
  { kind: { is: "bigint" }, example: "1n" } as Value<bigint>,
);

const exactTrajectoryOptions: Schema<ExactTrajectoryOptions & OfFit> = {
  parameters: optional(
    named(exactly, '{ r: "1/3" }', "parameter"),
    'Parameters by name: numbers, read as the decimals they print as, or texts such as "1/3"',
  ),
  initial: required(
    named(either(exactly, listOf(exactly)), "{ N: 10 }", "state"),
    "First values by state, or lists of them, oldest first, where the rule reads past values",
  ),
  inputs: optional(
    named(listOf(exactly), "{ payment: [300, 300] }", "input"),
    "By input: its values by period, period 0 first",
  ),
  periods: required(whole(0, 12), "Whole periods to run"),
  group,
};

const exactTrajectorySchema: FunctionSchema = {
  name: "exactTrajectory",
  takes,
  options: { fields: exactTrajectoryOptions },
  example: 'exactTrajectory(rule, { parameters: { r: "1/2", K: 100 }, initial: { N: 10 }, periods: 6 })',
  sizes: [exactPeriods],
};

const closedFormOptions: Schema<ClosedFormOptions & OfFit> = {
  ...held,
  initial,
  digits: optional(whole(1, 10, 15), "Significant digits that `guaranteed` asks for", 10),
};

const closedFormSchema: FunctionSchema = {
  name: "closedForm",
  takes,
  options: { fields: closedFormOptions },
  example: "closedForm(rule, { parameters: { r: 0.5, K: 100 }, initial: { N: 10 } })",
};

const searchRange: Value<SearchRange> = either(pair, named(pair, "{ N: [0, 100] }", "state"));

const range = optional(
  searchRange,
  "Lowest and highest value to look at, for a system by state",
  "the rule's bounds, or as far as its parameters and its turns from rising to falling suggest",
);

const equilibriaOptions: Schema<EquilibriaOptions & OfFit> = {
  ...held,
  range,
  searches: optional(whole(1, 400, 1_000_000), "For systems: how many places the search starts from", 400),
};

const equilibriaSchema: FunctionSchema = {
  name: "equilibria",
  takes,
  options: { fields: equilibriaOptions },
  example: "equilibria(rule, { parameters: { r: 0.5, K: 100 } })",
};

const cyclesOptions: Schema<CyclesOptions & OfFit> = {
  ...held,
  period: required(whole(1, 2, 1000), "Periods until the values come round"),
  range,
};

const cyclesSchema: FunctionSchema = {
  name: "cycles",
  takes,
  options: { fields: cyclesOptions },
  example: "cycles(rule, { period: 2, parameters: { r: 2.2, K: 100 } })",
};

const vary = required(nameOf("parameter", "r"), "Parameter that is varied");

const bifurcationsOptions: Schema<BifurcationsOptions & OfFit> = {
  ...held,
  vary,
  range: required(pair, "Values that are followed, from the first to the second, up or down"),
  initial: required(
    either(anyNumber, valuesByName("state", "{ N: 10 }")),
    "First value from which the cycle to be followed is reached; for a system a value by state, near the equilibrium to be followed",
  ),
  limit: optional(whole(1, 8, 10_000), "At most so many bifurcations", 8),
};

const bifurcationsSchema: FunctionSchema = {
  name: "bifurcations",
  takes,
  options: { fields: bifurcationsOptions },
  example: 'bifurcations(rule, { vary: "r", range: [1.8, 2.5], initial: 50 })',
};

const longest = 1e9;

const lyapunovExponentOptions: Schema<LyapunovExponentOptions & OfFit> = {
  ...held,
  initial,
  periods: optional(whole(300, 100_000, longest), "Periods measured, at least 300", "100,000"),
  discard: optional(whole(0, 1000, longest), "Periods left out at the beginning", "1,000"),
  level: intervalLevel,
  onProgress,
  signal,
};

const lyapunovExponentSchema: FunctionSchema = {
  name: "lyapunovExponent",
  takes,
  options: { fields: lyapunovExponentOptions },
  example: "lyapunovExponent(rule, { parameters: { r: 2.7, K: 100 }, initial: { N: 10 } })",
};

const predictionHorizonOptions: Schema<PredictionHorizonOptions & OfFit> = {
  ...lyapunovExponentOptions,
  error: required(positive, "Uncertainty of the first value, in its unit"),
  tolerance: required(positive, "Largest error of a value that is still of use, in the same unit"),
};

const predictionHorizonSchema: FunctionSchema = {
  name: "predictionHorizon",
  takes,
  options: { fields: predictionHorizonOptions },
  example: "predictionHorizon(rule, { error: 0.1, tolerance: 10, initial: { N: 10 } })",
};

type Ends = Exclude<AttractorOptions["values"], readonly number[]>;

const ends: Schema<Ends> = {
  from: required(anyNumber, "First value"),
  to: required(anyNumber, "Last value"),
  count: optional(whole(1, 600, 1_000_000), "How many values, ends included", 600),
};

const estimate: Schema<NonNullable<AttractorOptions["estimate"]>> = {
  value: required(anyNumber, "Estimate of the parameter"),
  interval: required(pair, "Its interval"),
};

const attractorOptions: Schema<AttractorOptions & OfFit> = {
  parameters: held.parameters,
  group,
  vary,
  values: required(
    either(listOf(anyNumber, "[2, 3, 4]"), shapeOf(ends, "{ from: 2.5, to: 4 }")),
    "Values of the parameter: a list, or two ends with how many",
  ),
  periods: optional(whole(1, 300, 1_000_000), "Periods kept at each value", 300),
  discard: optional(whole(0, 500, longest), "Periods left out before", 500),
  initial: required(
    either(anyNumber, listOf(anyNumber, "[0.1, 0.9]")),
    "First values of the one state to start from: several show attractors that exist side by side",
  ),
  estimate: optional(
    shapeOf(estimate, "{ value: 3.1, interval: [2.9, 3.3] }"),
    "What a fit says of the parameter, to be marked",
    "the estimate of the fit given",
  ),
  onProgress,
  signal,
};

/** Values kept by an attractor: every period kept at every value from every start. */
const attractorSize: FunctionSchema["sizes"] = [
  {
    option: "periods",
    bytes: ({ values, periods = 300, initial: starts, discard = 500 }) => {
      const at = Array.isArray(values) ? values.length : (((values as Ends).count ?? 600) as number);
      const from = Array.isArray(starts) ? starts.length : 1;
      return 8 * ((periods as number) * at * from + (discard as number));
    },
  },
];

const attractorSchema: FunctionSchema = {
  name: "attractor",
  takes,
  options: { fields: attractorOptions },
  example: 'attractor(rule, { vary: "r", values: { from: 1.5, to: 3 }, initial: 50 })',
  sizes: attractorSize,
};

const cobwebOptions: Schema<CobwebOptions & OfFit> = {
  ...held,
  initial: required(valuesByName("state", "{ N: 10 }"), "First value by state"),
  periods: optional(whole(1, 30, 1_000_000), "Periods shown", 30),
};

const cobwebSchema: FunctionSchema = {
  name: "cobweb",
  takes,
  options: { fields: cobwebOptions },
  example: "cobweb(rule, { initial: { N: 10 }, parameters: { r: 2.2, K: 100 } })",
};

const known: Schema<NonNullable<BasinsOptions["known"]>> = {
  mean: required(anyNumber, "Mean of the first value"),
  sd: required(positive, "Standard deviation of the first value"),
};

const basinsOptions: Schema<BasinsOptions & OfFit> = {
  ...held,
  range: required(pair, "Lowest and highest first value to look at"),
  count: optional(whole(1, 400, 1_000_000), "First values tried before borders are narrowed down", 400),
  periods: optional(whole(1, 3000, longest), "Periods until a path is taken to have arrived", "3,000"),
  known: optional(
    shapeOf(known, "{ mean: 20, sd: 4 }"),
    "What is known of the first value: normal with this mean and standard deviation",
  ),
  onProgress,
  signal,
};

const basinsSchema: FunctionSchema = {
  name: "basins",
  takes,
  options: { fields: basinsOptions },
  example: "basins(rule, { range: [0, 110], parameters: { r: 2.2, K: 100 } })",
};

const matrixGrowthSchema: FunctionSchema = {
  name: "matrixGrowth",
  takes,
  options: { fields: held },
  example: "matrixGrowth(rules.ages({ ages: 2 }), { parameters: { f1: 0, f2: 4, s1: 0.5 } })",
};

export const dynamicsSchemas: readonly FunctionSchema[] = [
  trajectorySchema,
  exactTrajectorySchema,
  closedFormSchema,
  equilibriaSchema,
  cyclesSchema,
  bifurcationsSchema,
  lyapunovExponentSchema,
  predictionHorizonSchema,
  attractorSchema,
  cobwebSchema,
  basinsSchema,
  matrixGrowthSchema,
];
