import type { Fit, GroupFit } from "../estimate/index.js";
import type { RandomStream } from "../numeric/index.js";
import type { CompiledRule } from "../rule/index.js";
import type { ConstantsDraw } from "./draw-constants.js";

/** Paths drawn from a fit, by state in the rule's order; each [paths, periods + 1], row-major. */
export interface PathDraws {
  readonly paths: number;
  readonly periods: number;
  /** Constants drawn, no further error. */
  readonly mean: readonly Float64Array[];
  /** The same constants, with process errors on the way or a reading's error on top. */
  readonly future: readonly Float64Array[];
  /** Draws thrown away because a constant left its bounds or a path the finite range. */
  readonly discarded: number;
}

/** What a run of draws needs. */
export interface DrawProblem {
  readonly fit: Fit;
  readonly group: GroupFit;
  readonly compiled: CompiledRule;
  readonly draw: ConstantsDraw;
  /** Absolute period of the first value. */
  readonly from: number;
  readonly periods: number;
  readonly paths: number;
}

/** Draws thrown away for each one kept, at most, before the run ends with what it has. */
const patience = 20;

/** Runs the rule from drawn constants, with and without the errors of single values. */
export function drawPaths(problem: DrawProblem, stream: RandomStream): PathDraws {
  const { fit, periods, paths } = problem;
  const states = fit.rule.states.length;
  const rows = periods + 1;
  const mean = fit.rule.states.map(() => new Float64Array(paths * rows));
  const future = fit.rule.states.map(() => new Float64Array(paths * rows));
  const one = pathDrawer(problem, stream);
  let kept = 0;
  let discarded = 0;
  while (kept < paths && discarded < patience * paths) {
    const drawn = one();
    if (drawn === undefined) {
      discarded++;
      continue;
    }
    for (let s = 0; s < states; s++)
      for (let t = 0; t < rows; t++) {
        mean[s]![kept * rows + t] = drawn.mean[t * states + s]!;
        future[s]![kept * rows + t] = drawn.future[t * states + s]!;
      }
    kept++;
  }
  return {
    paths: kept,
    periods,
    mean: mean.map((values) => values.slice(0, kept * rows)),
    future: future.map((values) => values.slice(0, kept * rows)),
    discarded,
  };
}

interface OnePath {
  /** [periods + 1, states]. */
  readonly mean: Float64Array;
  readonly future: Float64Array;
}

/** A function that draws one pair of paths, undefined where the draw cannot stand. */
function pathDrawer(problem: DrawProblem, stream: RandomStream): () => OnePath | undefined {
  const { fit, group, compiled, from, periods } = problem;
  const { rule } = fit;
  const unknowns = new Float64Array(group.estimates.length);
  const constants = Float64Array.from(rule.constants, (name) => group.constants[name]!);
  const initial = Float64Array.from(rule.states, (state) => group.initial[state]!);
  const mean = new Float64Array((periods + 1) * rule.states.length);
  const future = new Float64Array(mean.length);
  const error = errorOf(fit, group, stream);
  const places = group.estimates.map((estimate) =>
    estimate.role === "constant"
      ? rule.constants.indexOf(estimate.name)
      : rule.constants.length + rule.states.findIndex((state) => `${state}[0]` === estimate.name),
  );
  return () => {
    problem.draw(stream, unknowns);
    if (!withinBounds(fit, group, unknowns)) return undefined;
    places.forEach((place, i) => {
      if (place < constants.length) constants[place] = unknowns[i]!;
      else initial[place - constants.length] = unknowns[i]!;
    });
    compiled.path(initial, constants, [], from, periods, mean);
    if (fit.options.errors === "process")
      noisyPath(compiled, initial, constants, from, periods, error, future);
    else for (let i = 0; i < mean.length; i++) future[i] = error(mean[i]!);
    return mean.every(Number.isFinite) && future.every(Number.isFinite) ? { mean, future } : undefined;
  };
}

function withinBounds(fit: Fit, group: GroupFit, unknowns: Float64Array): boolean {
  return group.estimates.every((estimate, i) => {
    const limits = fit.options.bounds?.[estimate.name] ?? fit.rule.bounds[estimate.name];
    return limits === undefined || (unknowns[i]! >= limits[0] && unknowns[i]! <= limits[1]);
  });
}

/** Adds one error to a value: normal, on the log scale where the spread is proportional. */
function errorOf(fit: Fit, group: GroupFit, stream: RandomStream): (value: number) => number {
  const { sigma } = group;
  if (fit.options.spread === "proportional") return (value) => value * Math.exp(sigma * stream.normal());
  return (value) => value + sigma * stream.normal();
}

function noisyPath(
  compiled: CompiledRule,
  initial: Float64Array,
  constants: Float64Array,
  from: number,
  periods: number,
  error: (value: number) => number,
  out: Float64Array,
): void {
  const states = initial.length;
  const state = initial.slice();
  out.set(state);
  for (let t = 1; t <= periods; t++) {
    compiled.step(state, constants, [], from + t - 1, state);
    for (let s = 0; s < states; s++) {
      state[s] = error(state[s]!);
      out[t * states + s] = state[s]!;
    }
  }
}
