import {
  type InitialValues,
  type InputPlans,
  initialFrom,
  initialVector,
  inputsFrom,
  parametersBySlot,
  planOfGroup,
  runStart,
  type StartOptions,
} from "../../dynamics/index.js";
import { type Fit, problemOf } from "../../estimate/index.js";
import { type FitGround, fitGround, type Ground, type Noise, ruleNoise } from "../../projection/index.js";
import { indexOf, labelAt, labelBetween, type PeriodAxis } from "../../record/index.js";
import { compileRule, type ProcessNoise, type Rule } from "../../rule/index.js";
import type { MeasureUnits } from "../measure/measure.js";
import { refuseGroup, refusePeriod } from "../refusals.js";
import { plain } from "../words/amount.js";

/** What a decision is worked out from, beside the rule or fit itself. */
export interface StandingOptions extends StartOptions {
  /** Whole periods ahead. */
  readonly periods: number;
  /** By input: its plan. For a fit the first period ahead comes first, for a rule period 0. */
  readonly inputs?: InputPlans;
  /** Of a fit or a record with several groups: which one. */
  readonly group?: string;
  /** Of a rule: its parameters and first values. */
  readonly parameters?: Readonly<Record<string, number>>;
  readonly initial?: InitialValues;
  /** Of a rule: random change by state, for probabilities. */
  readonly noise?: Readonly<Record<string, Noise | ProcessNoise>>;
  /** Paths for probabilities and margins; default 2000. */
  readonly paths?: number;
  /** Default 1. */
  readonly seed?: number;
}

/** A rule or a fit made ready for questions about its future. */
export interface Standing extends MeasureUnits {
  readonly rule: Rule;
  readonly fit: Fit | undefined;
  readonly ground: Ground;
  /** Of a fit. */
  readonly fitGround: FitGround | undefined;
  /** Row of the path that is the present; what is ahead begins one row later. */
  readonly present: number;
  readonly axis: PeriodAxis;
  /** Time of period 0 of the axis, in the period column's unit. */
  readonly zero: number;
  /** The period column's value of a period that is named by its label, or given as such a value. */
  readonly timeOf: (period: string | number) => number;
  /** The period column's value at a row. */
  readonly timeAt: (row: number) => number;
  readonly change: readonly (Noise | undefined)[];
  readonly plans: InputPlans;
  readonly paths: number;
  readonly seed: number;
  /** The ground under other plans of inputs. */
  readonly planned: (plans: InputPlans) => Ground;
}

/** Whether a subject is a fit. */
export const isFit = (subject: Fit | Rule): subject is Fit => subject.kind === "fit";

/** Makes a rule or a fit ready. */
export function standingOf(subject: Fit | Rule, options: StandingOptions): Standing {
  return isFit(subject) ? fitStanding(subject, options) : ruleStanding(subject, options);
}

/** "N" of "N[0]"; any other name is its own. */
export const stateOf = (name: string): string => name.replace(/\[\d+\]$/, "");

function fitStanding(fit: Fit, options: StandingOptions): Standing {
  const { rule, observations } = fit;
  const names = fit.groups.map(({ group }) => group);
  if (options.group === undefined && fit.groups.length > 1) throw refuseGroup(undefined, names);
  const group = fit.groups.find((each) => each.group === (options.group ?? names[0]));
  if (group === undefined) throw refuseGroup(options.group, names);
  const planned = (plans: InputPlans): FitGround => fitGround(fit, group, options.periods, plans);
  const plans = Object.fromEntries(
    Object.entries(options.inputs ?? {}).map(([name, plan]) => [name, planOfGroup(name, plan, group.group)]),
  );
  const ground = planned(plans);
  const first = ground.recorded.time[0]!;
  const { axis } = ground.recorded;
  return {
    rule,
    fit,
    ground,
    fitGround: ground,
    present: ground.recordEnd - ground.from,
    axis,
    zero: first,
    timeAt: (row) => first + (ground.from + row) * axis.step.every,
    timeWords: timeWordsOf(axis, first),
    timeOf: timeReader(axis, first),
    change: problemOf(fit).group(group.group).noise.change,
    plans,
    paths: options.paths ?? 2000,
    seed: options.seed ?? 1,
    planned,
    unitOf: (name) => {
      const state = stateOf(name);
      return observations.states.find((each) => each.name === state)?.unit || (rule.units[state] ?? "");
    },
    periodUnit: axis.unit,
  };
}

function ruleStanding(rule: Rule, options: StandingOptions): Standing {
  const { periods } = options;
  const parameters = parametersBySlot(rule, options.parameters);
  const start = runStart(options);
  const { axis, from, recorded } = start;
  const initial = initialVector(rule, initialFrom(rule, start, options.initial));
  const compiled = compileRule(rule);
  const planned = (plans: InputPlans): Ground => {
    const inputs = inputsFrom(rule, start, periods, plans);
    return { rule, compiled, parameters, initial, inputs, from, periods };
  };
  const first = recorded?.time[0] ?? (axis.counts === "numbers" ? axis.origin : 0);
  return {
    rule,
    fit: undefined,
    ground: planned(options.inputs ?? {}),
    fitGround: undefined,
    present: 0,
    axis,
    zero: first,
    timeAt: (row) => first + (from + row) * axis.step.every,
    timeWords: timeWordsOf(axis, first),
    timeOf: timeReader(axis, first),
    change: ruleNoise(rule, parameters, options.noise),
    plans: options.inputs ?? {},
    paths: options.paths ?? 2000,
    seed: options.seed ?? 1,
    planned,
    unitOf: (name) => rule.units[stateOf(name)] ?? "",
    periodUnit: axis.unit,
  };
}

/** A time of the period column in a sentence; `zero` is that of period 0. */
function timeWordsOf(axis: PeriodAxis, zero: number): (time: number) => string {
  if (axis.counts === "numbers") return (time) => `${axis.unit} ${plain(time, 5)}`;
  return (time) => labelBetween(axis, 0, (time - zero) / axis.step.every);
}

function timeReader(axis: PeriodAxis, zero: number): Standing["timeOf"] {
  return (period) => {
    if (typeof period === "number") return period;
    const index = indexOf(axis, period);
    if (index === undefined) throw refusePeriod(period, labelAt(axis, 0), labelAt(axis, 1));
    return zero + index * axis.step.every;
  };
}
