import type { Fit, FitOptions, GroupFit } from "../../estimate/index.js";
import {
  type Minimum,
  minimiseSquares,
  type SquaresWorkspace,
  squaresWorkspace,
} from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import { type CompiledRule, compileRule, type Rule } from "../../rule/index.js";
import { type Comparisons, comparisonsOf } from "./comparisons-of.js";
import { residualSums } from "./residual-sums.js";

/** Limits of the unknowns in a search, [unknowns]. */
export interface Limits {
  readonly lower: Float64Array;
  readonly upper: Float64Array;
}

/** A rule made ready to be fitted many times: to changed values, to part of the record, with constants held. */
export interface Refitter {
  /** Free constants, then estimated initial states ("N[0]"). */
  readonly names: readonly string[];
  readonly limits: Limits;
  /** Compared values: state number, row of the group, and the value in the record's own unit. */
  readonly compared: Comparisons;
  /** [compared]: 1 where a value counts, 0 where it is left out. Change it between searches. */
  readonly counts: Float64Array;
  /** Puts other values [rows, states] in the record's place. */
  use(values: Float64Array): void;
  minimise(start: Float64Array, limits?: Limits): Minimum;
  sumAt(unknowns: Float64Array): number;
  /** Writes the fitted values, own unit, of all comparisons. */
  fitted(unknowns: Float64Array, out: Float64Array): void;
}

/** What a refit needs to know of a fit. */
export interface RefitProblem {
  readonly rule: Rule;
  readonly group: ObservedGroup;
  readonly options: FitOptions;
  /** Free unknowns in order. */
  readonly names: readonly string[];
  /** Values of all constants; those of free ones do not matter. */
  readonly constants: Readonly<Record<string, number>>;
  readonly initial: Readonly<Record<string, number>>;
}

/** The problem that a group of a fit solved. */
export function refitProblem(fit: Fit, group: GroupFit): RefitProblem {
  return {
    rule: fit.rule,
    group: fit.observations.groups.find((each) => each.name === group.group)!,
    options: fit.options,
    names: group.estimates.map((estimate) => estimate.name),
    constants: group.constants,
    initial: group.initial,
  };
}

/** Makes a problem ready for many searches; nothing is allocated in one but its result. */
export function refitter(
  problem: RefitProblem,
  compiled: CompiledRule = compileRule(problem.rule),
): Refitter {
  const { rule, names, options } = problem;
  const limits = limitsOf(rule, options, names);
  const compared = comparisonsOf(problem.group, rule.states, options.errors);
  const counts = new Float64Array(compared.count).fill(1);
  const sums = residualSums(problem, compiled, compared, counts);
  const workspace: SquaresWorkspace = squaresWorkspace(names.length);
  const open =
    limits.lower.every((l) => l === Number.NEGATIVE_INFINITY) &&
    limits.upper.every((u) => u === Number.POSITIVE_INFINITY);
  return {
    names,
    limits,
    compared,
    counts,
    use: sums.use,
    minimise: (start, held) =>
      minimiseSquares(sums.system, start, { ...(held ?? (open ? {} : limits)), workspace }),
    sumAt: sums.sumAt,
    fitted: sums.fitted,
  };
}

function limitsOf(rule: Rule, options: FitOptions, names: readonly string[]): Limits {
  const bounds = { ...rule.bounds, ...options.bounds };
  return {
    lower: Float64Array.from(names, (name) => bounds[name]?.[0] ?? Number.NEGATIVE_INFINITY),
    upper: Float64Array.from(names, (name) => bounds[name]?.[1] ?? Number.POSITIVE_INFINITY),
  };
}
