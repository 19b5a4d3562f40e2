import { minimiseSquares } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { linearInParameters, type Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import type { FitRows } from "../rows/fit-rows.js";
import { type Prepared, prepared } from "../systems/prepared.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import { searchBounds } from "./search-bounds.js";
import { trialPoints } from "./trial-values.js";

/** How many of the best trial points are carried on, and polished to a few digits. */
const kept = 5;
const polish = { gradientTolerance: 1e-4, iterationLimit: 60 };
/** How far beyond the middle of the points kept a polished point may move. */
const polishReach = 10;
/** Points looked at: a few for speed, many where those led nowhere. */
const fewTrials = 300;
const manyTrials = 10_000;

interface Point {
  readonly at: Float64Array;
  readonly sum: number;
}

/**
 * Where a search may begin, best first: trial values of the record's own scale are compared by their one-step
 * errors, the best polished by a one-step fit, and for a trajectory fit ranked by the trajectory's errors.
 */
export function startingPoints(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  whole: Prepared,
): readonly Float64Array[] {
  const few = candidates(rule, group, options, unknowns, whole, fewTrials);
  return few.length > 0 ? few : candidates(rule, group, options, unknowns, whole, manyTrials);
}

function candidates(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  whole: Prepared,
  most: number,
): readonly Float64Array[] {
  const { rows } = whole;
  if (options.factor !== undefined) {
    const trials = trialPoints(rule, group, options, unknowns, 20 * most);
    for (const trial of trials) scaleFactors(trial, unknowns, rows);
    return polished(ranked(trials, whole, 3 * kept), whole, unknowns).map((point) => point.at);
  }
  const stepOptions = { ...options, errors: "process" as const };
  const stepUnknowns = unknownsOf(rule, stepOptions);
  const step = options.errors === "process" ? whole : prepared(rule, group, stepUnknowns, stepOptions);
  const trials = trialPoints(
    rule,
    group,
    options,
    stepUnknowns,
    hasOneOptimum(rule, group, options, stepUnknowns) ? 1 : most,
  );
  const best = ranked(trials, step, kept);
  const better = polished(best, step, stepUnknowns);
  if (options.errors === "process") return better.map((point) => point.at);
  const carried = (at: Float64Array): Float64Array => withInitial(at, unknowns, group, options);
  // A one-step fit can run off where the trajectory has its optimum, so trial points stay in the choice as they are.
  const direct = ranked(trials.map(carried), whole, 3);
  const stepped = ranked(
    better.map((point) => carried(point.at)),
    whole,
    kept - 3,
  );
  return sorted([...stepped, ...direct]).map((point) => point.at);
}

/** Whether the one-step fit is solved from anywhere: linear in its parameters, without gaps, logarithms or bounds. */
function hasOneOptimum(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  { names, lower, upper }: Unknowns,
): boolean {
  const unbroken = group.index[group.index.length - 1] === group.index.length - 1;
  const open =
    lower.every((low) => low === Number.NEGATIVE_INFINITY) &&
    upper.every((high) => high === Number.POSITIVE_INFINITY);
  return (
    options.errors === "process" &&
    !onLogScale(options) &&
    open &&
    unbroken &&
    linearInParameters(rule, names)
  );
}

/** The best of several points; of points with the same sum only one. */
function ranked(points: readonly Float64Array[], { system }: Prepared, keep: number): Point[] {
  const all = sorted(points.map((at) => ({ at, sum: system.evaluate(at) })));
  const distinct = all.filter(({ sum }, i) => i === 0 || sum > all[i - 1]!.sum * (1 + 1e-6));
  return distinct.slice(0, keep);
}

function polished(points: readonly Point[], { system }: Prepared, unknowns: Unknowns): Point[] {
  const { lower, upper } = searchBounds(
    unknowns,
    points.map(({ at }) => at),
    polishReach,
  );
  return sorted(
    points.map((point) => {
      const done = minimiseSquares(system, point.at, { lower, upper, ...polish });
      return { at: done.estimates, sum: done.sumOfSquares };
    }),
  );
}

function sorted(points: readonly Point[]): Point[] {
  return points.filter((point) => Number.isFinite(point.sum)).sort((a, b) => a.sum - b.sum);
}

/** The parameters of a one-step point, with the first recorded values as initial states. */
function withInitial(
  at: Float64Array,
  unknowns: Unknowns,
  group: ObservedGroup,
  options: FitOptions,
): Float64Array {
  const whole = new Float64Array(unknowns.names.length);
  whole.set(at);
  unknowns.roles.forEach((role, i) => {
    if (role !== "initial") return;
    const [, state, period] = /^(.*)\[(\d+)\]$/.exec(unknowns.names[i]!)!;
    const values = group.values[state!]!;
    const recorded = group.index.indexOf(Number(period));
    const first = recorded >= 0 ? values[recorded]! : values.find((value) => Number.isFinite(value));
    const value = options.start?.[unknowns.names[i]!] ?? (Number.isFinite(first) ? first! : 0);
    whole[i] = Math.min(Math.max(value, unknowns.lower[i]!), unknowns.upper[i]!);
  });
  return whole;
}

/** Gives every factor the value at which the record and the path agree in the mean. */
function scaleFactors(at: Float64Array, unknowns: Unknowns, rows: FitRows): void {
  unknowns.roles.forEach((role, i) => {
    if (role === "factor") at[i] = 1;
  });
  rows.prepare(at, false);
  const logs = unknowns.factors.map(() => 0);
  const counts = unknowns.factors.map(() => 0);
  for (let k = 0; k < rows.count; k++) {
    rows.residualAt(k);
    const state = rows.states[k]!;
    logs[state] = logs[state]! + Math.log(rows.observed[k]! / rows.fitted());
    counts[state] = counts[state]! + 1;
  }
  const first = unknowns.parameters.length + unknowns.initial.length;
  unknowns.roles.forEach((role, i) => {
    const state = unknowns.columns[i]! - first;
    if (role === "factor") at[i] = Math.exp(logs[state]! / counts[state]!);
  });
}
