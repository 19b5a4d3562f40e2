import type { FitOptions } from "../../src/estimate/index.js";
import type { RandomStream } from "../../src/numeric/index.js";
import type { Observations, ObservedGroup } from "../../src/record/index.js";
import { compileRule, type Rule, recurrence } from "../../src/rule/index.js";
import { numbered } from "../estimate/record.js";

/** A way in which records come about, and how they are fitted. */
export interface Design {
  readonly name: string;
  readonly rule: Rule;
  readonly truth: Readonly<Record<string, number>>;
  readonly initial: number;
  readonly periods: number;
  readonly options: FitOptions;
  /** Standard deviations on the scale of the spread. */
  readonly process?: number;
  readonly reading?: number;
  /** Degrees of freedom of Student's t, where errors have heavier tails than normal ones. */
  readonly tails?: number;
  /** Periods left out; limit below which a reading is only known to be below it; readings averaged a period. */
  readonly without?: (period: number) => boolean;
  readonly limit?: number;
  readonly replicates?: number;
  /** The parameter that the record cannot determine, where the design is made so. */
  readonly undetermined?: string;
}

const geometric = recurrence("N[t+1] = R*N");
const sheltered = recurrence("N[t+1] = R*N/(1 + (R - 1)*N/K)");
const ricker = recurrence("N[t+1] = N*exp(r*(1 - N/K))");
const gompertz = recurrence("N[t+1] = exp(a)*N^b");
const quadratic = recurrence("ΔN = r*N*(1 - N/K)");
const affine = recurrence("x[t+1] = a + b*x");
const product = recurrence("N[t+1] = (p*q)*N");
const trajectory: FitOptions = { errors: "observation", distribution: "lognormal" };
const step: FitOptions = { errors: "process", distribution: "lognormal" };
const both: FitOptions = { errors: "both", distribution: "lognormal" };
const crowd = { rule: sheltered, truth: { R: 1.5, K: 100 }, initial: 5, options: trajectory };
const wander = { rule: gompertz, initial: Math.exp(3) };

export const designs: readonly Design[] = [
  {
    name: "geometric growth, 8 readings, 10%",
    rule: geometric,
    truth: { R: 1.2 },
    initial: 10,
    periods: 7,
    reading: 0.1,
    options: trajectory,
  },
  { ...crowd, name: "Beverton-Holt, 8 readings, 5%", periods: 7, truth: { R: 2.5, K: 100 }, reading: 0.05 },
  { ...crowd, name: "Beverton-Holt, 20 readings, 5%", periods: 19, reading: 0.05 },
  { ...crowd, name: "Beverton-Holt, 20 readings, 10%", periods: 19, reading: 0.1 },
  { ...crowd, name: "Beverton-Holt, 20 readings, 30%", periods: 19, reading: 0.3 },
  { ...crowd, name: "Beverton-Holt, 40 readings, 10%", periods: 39, reading: 0.1 },
  {
    ...crowd,
    name: "Beverton-Holt, 30 periods with a third missing, 10%",
    periods: 29,
    reading: 0.1,
    without: (t) => t % 3 === 1,
  },
  {
    ...crowd,
    name: "Beverton-Holt, 20 means of 3 replicates, 30%",
    periods: 19,
    reading: 0.3,
    replicates: 3,
  },
  {
    name: "Ricker, 20 readings, 10%",
    rule: ricker,
    truth: { r: 0.5, K: 100 },
    initial: 5,
    periods: 19,
    reading: 0.1,
    options: trajectory,
  },
  {
    name: "Ricker, 40 readings, 30%",
    rule: ricker,
    truth: { r: 0.5, K: 100 },
    initial: 5,
    periods: 39,
    reading: 0.3,
    options: trajectory,
  },
  {
    ...wander,
    name: "Gompertz, 20 readings, 10%",
    truth: { a: 1.2, b: 0.75 },
    initial: 5,
    periods: 19,
    reading: 0.1,
    options: trajectory,
  },
  {
    name: "quadratic, 40 readings, 5%",
    rule: quadratic,
    truth: { r: 0.4, K: 100 },
    initial: 5,
    periods: 39,
    reading: 0.05,
    options: trajectory,
  },
  {
    name: "geometric decline, 20 readings, the lowest below a limit, 10%",
    rule: geometric,
    truth: { R: 0.85 },
    initial: 100,
    periods: 19,
    reading: 0.1,
    limit: 8,
    options: trajectory,
  },
  {
    name: "one step, affine with slope 0.5, 40 pairs",
    rule: affine,
    truth: { a: 10, b: 0.5 },
    initial: 20,
    periods: 40,
    process: 1,
    options: { errors: "process" },
  },
  { ...crowd, name: "one step, Beverton-Holt, 40 pairs, 10%", periods: 40, process: 0.1, options: step },
  {
    ...wander,
    name: "one step, Gompertz with slope 0.6, 40 pairs, 20%",
    truth: { a: 1.2, b: 0.6 },
    periods: 40,
    process: 0.2,
    options: step,
  },
  {
    ...wander,
    name: "state-space, Gompertz with slope 0.6, 60 readings",
    truth: { a: 1.2, b: 0.6 },
    periods: 59,
    process: 0.2,
    reading: 0.1,
    options: both,
  },
  {
    name: "state-space, wandering level, 100 readings",
    rule: recurrence("x[t+1] = x + drift"),
    truth: { drift: 0.5 },
    initial: 50,
    periods: 99,
    process: 1,
    reading: 1,
    options: { errors: "both" },
  },
  {
    ...crowd,
    name: "robust, Beverton-Holt, 25 readings, 10%, normal errors",
    periods: 24,
    reading: 0.1,
    options: { ...trajectory, robust: true },
  },
  {
    ...crowd,
    name: "robust, Beverton-Holt, 25 readings, 10%, t errors on 3",
    periods: 24,
    reading: 0.1,
    tails: 3,
    options: { ...trajectory, robust: true },
  },
  {
    ...crowd,
    name: "exponential truth fitted with a capacity, 20 readings, 10%",
    rule: sheltered,
    truth: { R: 1.2, K: Number.POSITIVE_INFINITY },
    periods: 19,
    reading: 0.1,
    undetermined: "K",
  },
  {
    name: "only a product enters, 20 readings, 10%",
    rule: product,
    truth: { p: 1.1, q: 1.1 },
    initial: 10,
    periods: 19,
    reading: 0.1,
    options: trajectory,
    undetermined: "p",
  },
];

/** One record of a design. */
export function simulated(design: Design, stream: RandomStream): Observations {
  const { rule, options, periods, process = 0, reading = 0, replicates = 1, limit } = design;
  const log = options.distribution === "lognormal";
  const step = compileRule(rule).step;
  const parameters = Float64Array.from(rule.parameters, (name) => design.truth[name]!);
  const state = Float64Array.of(design.initial);
  const kept: { t: number; value: number; below: boolean }[] = [];
  const drawn = (): number => (design.tails === undefined ? stream.normal() : student(design.tails, stream));
  const moved = (value: number, sd: number): number =>
    log ? value * Math.exp(sd * drawn()) : value + sd * drawn();
  for (let t = 0; t <= periods; t++) {
    const value = moved(state[0]!, reading / Math.sqrt(replicates));
    const below = limit !== undefined && value < limit;
    if (!design.without?.(t)) kept.push({ t, value: below ? limit! : value, below });
    step(state, parameters, [], t, state);
    if (process > 0) state[0] = moved(state[0]!, process);
  }
  return recordOf(rule.states[0]!, kept, replicates);
}

/** A Student t value on a whole number of degrees of freedom. */
function student(degreesOfFreedom: number, stream: RandomStream): number {
  const normal = stream.normal();
  let squares = 0;
  for (let k = 0; k < degreesOfFreedom; k++) squares += stream.normal() ** 2;
  return normal / Math.sqrt(squares / degreesOfFreedom);
}

function recordOf(
  name: string,
  kept: readonly { readonly t: number; readonly value: number; readonly below: boolean }[],
  replicates: number,
): Observations {
  const group: ObservedGroup = {
    name: "",
    axis: numbered(kept[0]!.t),
    index: Int32Array.from(kept, ({ t }) => t),
    time: Float64Array.from(kept, ({ t }) => t),
    values: { [name]: Float64Array.from(kept, ({ value }) => value) },
    inputs: {},
    rows: Int32Array.from(kept, (_, row) => row + 1),
    ...(kept.some(({ below }) => below) && {
      censoring: { [name]: Int8Array.from(kept, ({ below }) => (below ? -1 : 0)) },
    }),
    ...(replicates > 1 && { weights: new Float64Array(kept.length).fill(replicates) }),
  };
  const counts = { read: kept.length, used: kept.length, flagged: 0, corrected: 0, refused: 0 };
  return {
    kind: "observations",
    groups: [group],
    states: [{ name, column: name, unit: "", measured: "level" }],
    axis: group.axis,
    inputs: [],
    order: "",
    findings: [],
    counts,
  };
}
