import type { LinearisedSystem, StopReason, Warning } from "../numeric/index.js";
import { covarianceFromTriangle, minimiseSquares, studentQuantile } from "../numeric/index.js";
import type { ObservedGroup } from "../record/index.js";
import { compileRule, type Rule } from "../rule/index.js";
import { checkGroup } from "./check-group.js";
import { type Criteria, criteria } from "./criteria.js";
import { cutOf } from "./cut.js";
import type { FitOptions } from "./fit-options.js";
import { type FitPoint, fitPoints } from "./fit-points.js";
import { fitWarnings } from "./fit-warnings.js";
import { type Interval, waldInterval } from "./interval.js";
import { normalEquations } from "./normal-equations.js";
import { type Profile, profileInterval } from "./profile-interval.js";
import { refuseNoStart } from "./refusals.js";
import type { ResidualRows } from "./residual-rows.js";
import { rowsOf } from "./rows-of.js";
import { startingPoints } from "./starting-points.js";
import { place, type Unknowns, unknownsOf } from "./unknowns.js";

/** One unknown of a fit. */
export interface Estimate {
  /** The constant's name, or "N[0]" for an initial state. */
  readonly name: string;
  readonly role: "constant" | "initial";
  readonly unit: string;
  readonly value: number;
  /** Undefined where the record does not determine it. */
  readonly standardError: number | undefined;
  readonly profile: Interval;
  readonly wald: Interval | undefined;
  /** By increasing value: (RSS(value) - RSS) / sigma^2; cut by `cut`. */
  readonly trace: Profile["trace"];
}

/** The fit of one group of a record. */
export interface GroupFit {
  readonly group: string;
  readonly estimates: readonly Estimate[];
  /** [unknowns, unknowns], row-major, by sigma^2 = RSS/(n - p); NaN where not determined. */
  readonly covariance: readonly number[];
  /** Every constant of the rule at its estimate or its given value. */
  readonly constants: Readonly<Record<string, number>>;
  /** Initial states of a trajectory fit (period 0); of a one-step fit the first recorded values. */
  readonly initial: Readonly<Record<string, number>>;
  readonly sumOfSquares: number;
  /** n: residuals. */
  readonly count: number;
  /** n - p. */
  readonly degreesOfFreedom: number;
  /** sqrt(RSS/(n - p)), on the fitting scale. */
  readonly sigma: number;
  readonly criteria: Criteria;
  /** Critical value of the profile's increase. */
  readonly cut: number;
  readonly stop: StopReason;
  readonly points: readonly FitPoint[];
  readonly warnings: readonly Warning[];
}

/** How many starting points are tried before the lowest optimum is taken. */
const tries = 3;

/** Fits a rule to one group of a record. */
export function fitGroup(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  const unknowns = unknownsOf(rule, options);
  checkGroup(rule, group, options, unknowns);
  const compiled = compileRule(rule);
  const rows = rowsOf(rule, compiled, group, unknowns, options);
  const starts = startingPoints(rule, compiled, group, options, unknowns, rows);
  if (starts.length === 0) throw refuseNoStart(group, rule.text);
  const system = normalEquations(rows);
  const solved = solve(system, rows, unknowns, starts, options);
  return describe(rule, group, options, unknowns, rows, solved);
}

interface Solved {
  readonly at: Float64Array;
  readonly sumOfSquares: number;
  readonly stop: StopReason;
  readonly profiles: readonly Profile[];
  readonly covariance: Float64Array;
  readonly determined: readonly boolean[];
  readonly cut: number;
}

/** The lowest optimum from several starts, with its profiles; done again where a profile finds a lower one. */
function solve(
  system: LinearisedSystem,
  rows: ResidualRows,
  unknowns: Unknowns,
  starts: readonly Float64Array[],
  options: FitOptions,
): Solved {
  const searches = starts.slice(0, tries).map((start) => minimiseSquares(system, start, unknowns));
  const best = searches.reduce((low, next) => (next.sumOfSquares < low.sumOfSquares ? next : low));
  const at = Float64Array.from(best.estimates);
  const { variance, cut } = cutOf(best.sumOfSquares, rows.count, rows.size, options);
  system.evaluate(at);
  system.linearise(at);
  const { covariance, determined } = covarianceFromTriangle(system.triangle, system.size);
  const problem = {
    system,
    estimates: at,
    sumOfSquares: best.sumOfSquares,
    lower: unknowns.lower,
    upper: unknowns.upper,
    variance,
    cut,
    level: options.level ?? 0.95,
  };
  const profiles = unknowns.names.map((_, i) => {
    const error = Math.sqrt(variance * covariance[i * rows.size + i]!);
    const usable = determined[i] && error > 0 && Number.isFinite(error);
    const spacing = usable ? error * Math.sqrt(cut) : 0.1 * Math.abs(at[i]!) || 1;
    return profileInterval(problem, i, spacing);
  });
  const better = profiles.find((profile) => profile.better !== undefined)?.better;
  if (better !== undefined && starts[0] !== better) return solve(system, rows, unknowns, [better], options);
  return { at, sumOfSquares: best.sumOfSquares, stop: best.stop, profiles, covariance, determined, cut };
}

function describe(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  rows: ResidualRows,
  solved: Solved,
): GroupFit {
  const { at, profiles, covariance, determined } = solved;
  const size = rows.size;
  const degreesOfFreedom = rows.count - size;
  const variance = solved.sumOfSquares / degreesOfFreedom;
  const level = options.level ?? 0.95;
  const student = studentQuantile((1 + level) / 2, degreesOfFreedom);
  const estimates = unknowns.names.map((name, i): Estimate => {
    const profile = profiles[i]!;
    const bounded = profile.interval.lower !== undefined && profile.interval.upper !== undefined;
    const known = determined[i] && bounded;
    const standardError = known ? Math.sqrt(variance * covariance[i * size + i]!) : undefined;
    return {
      name,
      role: unknowns.roles[i]!,
      unit: rule.units[name] ?? "",
      value: at[i]!,
      standardError,
      profile: profile.interval,
      wald: waldInterval(at[i]!, standardError, student, level),
      trace: profile.trace,
    };
  });
  place(unknowns, at);
  const first = (state: string): number => group.values[state]![0]!;
  const initial = rule.states.map((state, s) => [
    state,
    options.errors === "process" ? first(state) : unknowns.initial[s]!,
  ]);
  const fitted = {
    group: group.name,
    estimates,
    covariance: Array.from(covariance, (value) => value * variance),
    constants: Object.fromEntries(rule.constants.map((name, c) => [name, unknowns.constants[c]!])),
    initial: Object.fromEntries(initial) as Record<string, number>,
    sumOfSquares: solved.sumOfSquares,
    count: rows.count,
    degreesOfFreedom,
    sigma: Math.sqrt(variance),
    criteria: criteria(solved.sumOfSquares, rows.count, size),
    cut: solved.cut,
    stop: solved.stop,
    points: fitPoints(rule, group, options, rows, at, covariance),
  };
  return Object.freeze({ ...fitted, warnings: fitWarnings(fitted, unknowns) });
}
