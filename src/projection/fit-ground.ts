import { type InputPlans, plannedInputs } from "../dynamics/index.js";
import type { Fit, GroupFit } from "../estimate/index.js";
import { inputByPeriod, type ObservedGroup, periodWords } from "../record/index.js";
import { compileRule } from "../rule/index.js";
import type { Ground } from "./central-path.js";
import { refuseGap } from "./refusals.js";

/** A ground, and where the fit's unknowns stand in it. */
export interface FitGround extends Ground {
  readonly group: GroupFit;
  readonly recorded: ObservedGroup;
  /** Index of the period that the future starts after: of the last recorded value, unless an earlier one was asked for. */
  readonly recordEnd: number;
  /** By unknown of the fit: slot among parameters, then state vector; -1 where the path does not begin with it. */
  readonly places: Int32Array;
  /** Where a filter leaves the present state uncertain: its mean and covariance, on the log scale or not. */
  readonly belief?: { readonly mean: Float64Array; readonly covariance: Float64Array; readonly log: boolean };
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
  const { rule, observations } = fit;
  const recorded = observations.groups.find((each) => each.name === group.group)!;
  const recordEnd = startsAfter ?? recorded.index[recorded.index.length - 1]!;
  const trajectory = fit.options.errors === "observation";
  const reach = Math.max(0, ...rule.lags.map(({ lag }) => lag));
  const from = trajectory ? reach : recordEnd;
  const slots = [...rule.states.map((state) => ({ state, lag: 0 })), ...rule.lags];
  const names = slots.map(({ state, lag }) => `${state}[${reach - lag}]`);
  const belief = beliefOf(fit, group);
  const initial = Float64Array.from(slots, ({ state, lag }, s) => {
    if (belief !== undefined) return belief.log ? Math.exp(belief.mean[s]!) : belief.mean[s]!;
    if (trajectory) return fittedStart(fit, group, names[s]!, state, lag);
    return recordedAt(recorded, state, recordEnd - lag);
  });
  const width = rule.parameters.length;
  const places = Int32Array.from(group.estimates, ({ name, role }) => {
    if (role === "parameter") return rule.parameters.indexOf(name);
    const slot = names.indexOf(name);
    return slot < 0 || !trajectory ? -1 : width + slot;
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
    places,
    ...(belief && { belief }),
  };
}

function beliefOf(fit: Fit, { filter }: GroupFit): FitGround["belief"] {
  if (filter === undefined) return undefined;
  return {
    mean: Float64Array.from(filter.last.mean),
    covariance: Float64Array.from(filter.last.covariance),
    log: fit.options.distribution === "lognormal",
  };
}

function fittedStart(fit: Fit, group: GroupFit, name: string, state: string, lag: number): number {
  const estimated = group.estimates.find((estimate) => estimate.name === name);
  if (estimated !== undefined) return estimated.value;
  const given = fit.options.initial?.[state] ?? group.initial[state]!;
  return typeof given === "number" ? given : given[given.length - 1 - lag]!;
}

function recordedAt(recorded: ObservedGroup, state: string, period: number): number {
  const row = recorded.index.indexOf(period);
  const value = row < 0 ? Number.NaN : recorded.values[state]![row]!;
  if (!Number.isFinite(value)) throw refuseGap(state, periodWords(recorded.axis, period));
  return value;
}
