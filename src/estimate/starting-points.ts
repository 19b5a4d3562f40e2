import { minimiseSquares, randomStream } from "../numeric/index.js";
import type { ObservedGroup } from "../record/index.js";
import type { CompiledRule, Rule } from "../rule/index.js";
import type { FitOptions } from "./fit-options.js";
import { normalEquations, sumOfSquaresAt } from "./normal-equations.js";
import { oneStepRows } from "./one-step-rows.js";
import type { ResidualRows } from "./residual-rows.js";
import { type Unknowns, unknownsOf } from "./unknowns.js";

/** Most combinations of trial values that are looked at. */
const mostTrials = 20_000;
/** How many of the best trial points are carried on. */
const kept = 6;

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
  compiled: CompiledRule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  rows: ResidualRows,
): readonly Float64Array[] {
  const stepUnknowns = unknownsOf(rule, { ...options, errors: "process" });
  const step = oneStepRows(rule, compiled, group, stepUnknowns, options.spread ?? "constant");
  const trials = trialPoints(rule, group, options, stepUnknowns);
  const best = ranked(trials, step);
  const system = normalEquations(step);
  const polished = best.map((point) => {
    const done = minimiseSquares(system, point.at, stepUnknowns);
    return { at: Float64Array.from(done.estimates), sum: done.sumOfSquares };
  });
  if (options.errors === "process") return sorted(polished).map((point) => point.at);
  const whole = [...polished, ...best].map((point) => withInitial(point.at, unknowns, rule, group));
  return ranked(whole, rows).map((point) => point.at);
}

function ranked(points: readonly Float64Array[], rows: ResidualRows): Point[] {
  return sorted(points.map((at) => ({ at, sum: sumOfSquaresAt(rows, at) }))).slice(0, kept);
}

function sorted(points: readonly Point[]): Point[] {
  return points.filter((point) => Number.isFinite(point.sum)).sort((a, b) => a.sum - b.sum);
}

/** The constants of a one-step point, with the first recorded values as initial states. */
function withInitial(at: Float64Array, unknowns: Unknowns, rule: Rule, group: ObservedGroup): Float64Array {
  const whole = new Float64Array(unknowns.names.length);
  whole.set(at);
  unknowns.roles.forEach((role, i) => {
    if (role !== "initial") return;
    const state = rule.states[unknowns.columns[i]! - rule.constants.length]!;
    const first = group.values[state]!.find((value) => Number.isFinite(value)) ?? 0;
    whole[i] = Math.min(Math.max(first, unknowns.lower[i]!), unknowns.upper[i]!);
  });
  return whole;
}

/** Combinations of trial values; a seeded sample of them when they are too many. */
function trialPoints(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
): readonly Float64Array[] {
  const scales = scalesOf(rule, group);
  const choices = unknowns.names.map((name, i) => {
    const given = options.start?.[name] ?? rule.guesses[name];
    if (given !== undefined) return [given];
    const inside = scales.filter((value) => value >= unknowns.lower[i]! && value <= unknowns.upper[i]!);
    return inside.length > 0 ? inside : [boundedMiddle(unknowns.lower[i]!, unknowns.upper[i]!)];
  });
  const total = choices.reduce((product, values) => product * values.length, 1);
  if (total <= mostTrials) return everyCombination(choices, total);
  const stream = randomStream(1);
  return Array.from({ length: mostTrials }, () =>
    Float64Array.from(choices, (values) => values[Math.floor(stream.uniform() * values.length)]!),
  );
}

function everyCombination(choices: readonly (readonly number[])[], total: number): Float64Array[] {
  return Array.from({ length: total }, (_, number) => {
    let rest = number;
    return Float64Array.from(choices, (values) => {
      const value = values[rest % values.length]!;
      rest = Math.floor(rest / values.length);
      return value;
    });
  });
}

/** Values that constants of plain rules tend to have: pure numbers, levels, changes and inverses of levels. */
function scalesOf(rule: Rule, group: ObservedGroup): readonly number[] {
  const pure = [0.02, 0.1, 0.3, 0.6, 0.9, 1.2, 2, 4, -0.1, -0.5, -1];
  const own = rule.states.flatMap((state) => {
    const values = group.values[state]!.filter((value) => Number.isFinite(value));
    const size = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    const middle = values.slice().sort()[values.length >> 1] ?? size;
    const change = (values[values.length - 1]! - values[0]!) / Math.max(1, values.length - 1);
    return [size, 1.3 * size, 3 * size, middle, 0.1 * size, change, -change, 1 / size, 0.1 / size, -1 / size];
  });
  return [...new Set([...pure, ...own.filter((value) => Number.isFinite(value) && value !== 0)])];
}

function boundedMiddle(lower: number, upper: number): number {
  if (Number.isFinite(lower) && Number.isFinite(upper)) return (lower + upper) / 2;
  if (Number.isFinite(lower)) return lower + Math.max(1, Math.abs(lower)) / 2;
  return Number.isFinite(upper) ? upper - Math.max(1, Math.abs(upper)) / 2 : 1;
}
