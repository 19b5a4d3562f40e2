import { type InputPlans, plannedInputs } from "../dynamics/index.js";
import { type Beginning, type Fit, type GroupFit, problemOf } from "../estimate/index.js";
import { inputByPeriod, type ObservedGroup, periodWords } from "../record/index.js";
import { compileRule, type Rule } from "../rule/index.js";
import type { Ground } from "./central-path.js";
import { startNames } from "./levels.js";
import { refuseGap } from "./refusals.js";

/** What a record reads of a state: a multiple of it. */
export interface StateFactor {
  readonly name: string;
  readonly value: number;
  /** Among the unknowns of the fit. */
  readonly unknown: number;
}

/** A ground, and where the fit's unknowns stand in it. */
export interface FitGround extends Ground {
  readonly group: GroupFit;
  readonly recorded: ObservedGroup;
  /** Index of the period that the future starts after: of the last recorded value, unless an earlier one was asked for. */
  readonly recordEnd: number;
  /** By unknown of the fit: slot among parameters, then state vector; -1 where the path does not begin with it. */
  readonly places: Int32Array;
  /** By state that the record reads through a factor: the factor's name and value, and its place among the unknowns. */
  readonly factors: readonly (StateFactor | undefined)[];
  /** Where a filter leaves the present state uncertain. */
  readonly filtered?: NonNullable<Beginning["filtered"]>;
}

/**
 * Where the future of a fitted group begins: a trajectory at its own start, a chain of steps at the last recorded value.
 *
 * @param periods - beyond the one that the future starts after.
 * @param startsAfter - index of that period; default the last recorded one.
 */
export function fitGround(
  fit: Fit,
  group: GroupFit,
  periods: number,
  plans: InputPlans,
  startsAfter?: number,
): FitGround {
  const { rule } = fit;
  const { recorded, beginning } = problemOf(fit).group(group.group);
  const recordEnd = startsAfter ?? recorded.index[recorded.index.length - 1]!;
  const { period: from, fromStart, initial, places, filtered } = beginning(recordEnd);
  [...rule.states.map((state) => ({ state, lag: 0 })), ...rule.lags].forEach(({ state, lag }, s) => {
    if (!Number.isFinite(initial[s]!)) throw refuseGap(state, periodWords(recorded.axis, from - lag));
  });
  return {
    rule,
    compiled: compileRule(rule),
    parameters: Float64Array.from(rule.parameters, (name) => group.parameters[name]!),
    initial,
    inputs: plannedInputs(rule, plans, {
      axis: recorded.axis,
      group: group.group,
      recorded: (input) => inputByPeriod(recorded, input),
      from,
      first: recordEnd + 1,
      last: recordEnd + periods,
    }),
    from,
    periods: recordEnd + periods - from,
    group,
    recorded,
    recordEnd,
    present: recordEnd - from,
    places,
    startNames: fromStart ? startNames(rule) : [],
    firstValues: fromStart ? {} : firstRecorded(rule, recorded),
    factors: factorsOf(fit, group),
    ...(filtered && { filtered }),
  };
}

function firstRecorded(rule: Rule, recorded: ObservedGroup): Readonly<Record<string, number>> {
  const known = rule.states.map(
    (state) => [`${state}[0]`, recorded.values[state]?.[0] ?? Number.NaN] as const,
  );
  return Object.fromEntries(known.filter(([, value]) => Number.isFinite(value)));
}

function factorsOf(fit: Fit, { estimates }: GroupFit): FitGround["factors"] {
  const { factors } = problemOf(fit);
  return fit.rule.states.map((state) => {
    const name = factors[state];
    const unknown = estimates.findIndex((estimate) => estimate.name === name && estimate.role === "factor");
    return name === undefined || unknown < 0
      ? undefined
      : { name, value: estimates[unknown]!.value, unknown };
  });
}
