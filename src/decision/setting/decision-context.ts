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
import { type Fit, type GroupFit, problemOf } from "../../estimate/index.js";
import { type RandomStream, type RunHooks, randomStream, type Tick, ticker } from "../../numeric/index.js";
import {
  centralLevels,
  type FitGround,
  fitGround,
  type Ground,
  levelValues,
  type Noise,
  ruleNoise,
  startNames,
} from "../../projection/index.js";
import { indexOf, labelAt, type PeriodAxis } from "../../record/index.js";
import { compileRule, type ProcessNoise, type Rule } from "../../rule/index.js";
import { groupError, periodError } from "../errors.js";
import type { MeasureUnits } from "../measure/measure-words.js";
import { withinError } from "../words/amount.js";
import { firstPeriodLabel } from "../words/record-words.js";

/** What a decision is worked out from, beside the rule or fit itself. */
export interface DecisionOptions extends StartOptions, RunHooks {
  /** Whole periods ahead. */
  readonly periods: number;
  /** By input: what it will be, by the periods of the record or of the run. */
  readonly inputs?: InputPlans;
  /** Of a fit or a record with several groups: which one. */
  readonly group?: string;
  /** Of a rule: its parameters by name. */
  readonly parameters?: Readonly<Record<string, number>>;
  /** Of a rule: its first values by state. */
  readonly initial?: InitialValues;
  /** Of a rule: random change by state; every measure is then one of the paths' distribution. */
  readonly noise?: Readonly<Record<string, Noise | ProcessNoise>>;
  /** Random paths where chance has a part; default 4000. */
  readonly paths?: number;
  /** Seed of the random numbers, a whole number; default that of the case, else 1. */
  readonly seed?: number;
}

/** A rule or a fit made ready for questions about its future. */
export interface DecisionContext extends MeasureUnits {
  readonly rule: Rule;
  readonly fit: Fit | undefined;
  readonly ground: Ground;
  /** Of a fit. */
  readonly fitGround: FitGround | undefined;
  readonly axis: PeriodAxis;
  /** Time of period 0 of the axis, in the period column's unit. */
  readonly zero: number;
  /** The period column's value of a period that is named by its label, or given as such a value. */
  readonly timeOf: (period: string | number) => number;
  /** The period column's value at a row. */
  readonly timeAt: (row: number) => number;
  /** By state: the random change at parameters of its own, because its size may be one of them. */
  readonly changeAt: (parameters: Float64Array) => readonly (Noise | undefined)[];
  readonly plans: InputPlans;
  readonly paths: number;
  readonly seed: number;
  /** Random numbers of the question, the same at every call: those of a forecast or simulation with this seed. */
  readonly stream: () => RandomStream;
  /** Called before each run of the rule. */
  readonly tick: Tick;
  /** The ground under other plans of inputs. */
  readonly planned: (plans: InputPlans) => Ground;
}

/** Runs that an answer takes, roughly: a place in the range each, and for a fit some at every draw of its parameters. */
const runsOfRule = 100;
const runsOfFit = 5000;

/** Whether a subject is a fit. */
export const isFit = (subject: Fit | Rule): subject is Fit => subject.kind === "fit";

/** "N" of "N[0]"; any other name is its own. */
export const stateOf = (name: string): string => name.replace(/\[\d+\]$/, "");

/** Makes a rule or a fit ready. */
export function decisionContext(subject: Fit | Rule, options: DecisionOptions): DecisionContext {
  const own = isFit(subject) ? fitContext(subject, options) : ruleContext(subject, options);
  const { ground } = own;
  return {
    ...own,
    paths: options.paths ?? 4000,
    seed: options.seed ?? 1,
    tick: ticker(options, isFit(subject) ? runsOfFit : runsOfRule),
    random: own.changeAt(ground.parameters).some((noise) => noise !== undefined),
    levelAt: (level) => levelValues(level, centralLevels(ground))[0]!,
  };
}

type OwnContext = Omit<DecisionContext, "paths" | "seed" | "tick" | "random" | "levelAt">;

function fitContext(fit: Fit, options: DecisionOptions): OwnContext {
  const { rule, observations } = fit;
  const [group, place] = groupOf(fit, options.group);
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
    axis,
    zero: first,
    timeAt: (row) => first + (ground.from + row) * axis.step.every,
    timeWords: timeWordsOf(axis, first),
    timeOf: timeReader(axis, first),
    changeAt: () => problemOf(fit).group(group.group).noise.change,
    plans,
    stream: () =>
      Array.from({ length: place }).reduce<RandomStream>(
        (own) => own.jump(),
        randomStream(options.seed ?? 1),
      ),
    planned,
    unitOf: (name) => {
      const state = stateOf(name);
      const scaled = ground.factors[rule.states.indexOf(state)] !== undefined;
      const recorded = observations.states.find((each) => each.name === state)?.unit;
      return (scaled ? undefined : recorded) || (rule.units[state] ?? "");
    },
    periodUnit: axis.unit,
  };
}

function groupOf(fit: Fit, name: string | undefined): readonly [GroupFit, number] {
  const names = fit.groups.map(({ group }) => group);
  if (name === undefined && fit.groups.length > 1) throw groupError(undefined, names);
  const place = fit.groups.findIndex(({ group }) => group === (name ?? names[0]));
  if (place < 0) throw groupError(name, names);
  return [fit.groups[place]!, place];
}

function ruleContext(rule: Rule, options: DecisionOptions): OwnContext {
  const { periods } = options;
  const parameters = parametersBySlot(rule, options.parameters);
  const start = runStart(options);
  const { axis, from, recorded } = start;
  const initial = initialVector(rule, initialFrom(rule, start, options.initial));
  const compiled = compileRule(rule);
  const planned = (plans: InputPlans): Ground => {
    const inputs = inputsFrom(rule, start, periods, plans);
    const named = { startNames: startNames(rule), firstValues: {} };
    return { rule, compiled, parameters, initial, inputs, from, periods, present: 0, ...named };
  };
  const first = recorded?.time[0] ?? (axis.counts === "numbers" ? axis.origin : 0);
  return {
    rule,
    fit: undefined,
    ground: planned(options.inputs ?? {}),
    fitGround: undefined,
    axis,
    zero: first,
    timeAt: (row) => first + (from + row) * axis.step.every,
    timeWords: timeWordsOf(axis, first),
    timeOf: timeReader(axis, first),
    plans: options.inputs ?? {},
    changeAt: (at) => ruleNoise(rule, at, options.noise),
    stream: () => randomStream(options.seed ?? 1),
    planned,
    unitOf: (name) => rule.units[stateOf(name)] ?? "",
    periodUnit: axis.unit,
  };
}

/** A time of the period column in a sentence, by labels that of the first period at or past it; `zero` is that of period 0. */
function timeWordsOf(axis: PeriodAxis, zero: number): DecisionContext["timeWords"] {
  if (axis.counts === "numbers") return (time, error = 0) => `${axis.unit} ${withinError(time, error, 5)}`;
  return (time) => firstPeriodLabel(axis, (time - zero) / axis.step.every);
}

function timeReader(axis: PeriodAxis, zero: number): DecisionContext["timeOf"] {
  return (period) => {
    if (typeof period === "number") return period;
    const index = indexOf(axis, period);
    if (index === undefined) throw periodError(period, labelAt(axis, 0), labelAt(axis, 1));
    return zero + index * axis.step.every;
  };
}
