import {
  covarianceFromTriangle,
  minimiseSquares,
  type SquaresWorkspace,
  squaresWorkspace,
} from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { fewGroupsError, noStartError } from "../errors.js";
import { memberCovariance } from "../intervals/member-covariance.js";
import type { FitOptions } from "../options/fit-options.js";
import { criteriaOf } from "../result/criteria.js";
import { describeFit } from "../result/describe-fit.js";
import { estimatesOf } from "../result/estimate-of.js";
import { likelihoodCut } from "../search/cut.js";
import { likelihoodObjective } from "../search/likelihood-objective.js";
import { optimum } from "../search/optimum.js";
import { startingPoints } from "../search/starting-points.js";
import { type Penalty, penalisedSystem } from "../systems/penalised-system.js";
import { type Prepared, prepared } from "../systems/prepared.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import type { JointFit } from "./joint-fit.js";

/** One group in a mixed fit: its own least squares, drawn towards the population. */
interface Member {
  readonly group: ObservedGroup;
  readonly own: Unknowns;
  readonly part: Prepared;
  readonly system: ReturnType<typeof penalisedSystem>;
  readonly workspace: SquaresWorkspace;
  /** Where its search begins, moved along with the population. */
  at: Float64Array;
}

/**
 * Fits parameters that differ from group to group as draws from a normal population: the population's means and standard
 * deviations and sigma by the likelihood in which every group's own parameters are integrated out by Laplace's method; its
 * initial states have no population. A group's part gives its own parameters, drawn towards the means.
 *
 * @see Pinheiro and Bates (2000), Mixed-Effects Models in S and S-PLUS, section 7.2: the Laplace approximation.
 */
export function mixedFit(rule: Rule, groups: readonly ObservedGroup[], options: FitOptions): JointFit {
  if (groups.length < 3) throw fewGroupsError(groups.length);
  const parameters = unknownsOf(rule, options).roles.filter((role) => role === "parameter").length;
  const penalty: Penalty = { means: new Float64Array(parameters), roots: new Float64Array(parameters) };
  const members = groups.map((group) => member(rule, group, options, penalty));
  const population = populationUnknowns(members[0]!.own, parameters);
  const minusTwice = (at: Float64Array): number => marginal(at, members, penalty);
  const start = populationStart(members, parameters);
  const objective = likelihoodObjective(minusTwice, population);
  const found = optimum(
    objective,
    population,
    [start],
    () => likelihoodCut(options),
    options.intervals !== "none",
  );
  minusTwice(found.at);
  const variance = found.at[2 * parameters]!;
  const count = members.reduce((sum, each) => sum + each.part.rows.count, 0);
  const together = { values: count, unknowns: population.names.length };
  const measures = { sigma: Math.sqrt(variance), exact: false, together };
  const size = population.names.length;
  const weights = penalty.roots.map((root) => root ** 2 / variance);
  const means = Float64Array.from(
    { length: parameters * parameters },
    (_, k) => found.covariance[Math.floor(k / parameters) * size + (k % parameters)]!,
  );
  return {
    criteria: criteriaOf(-0.5 * found.value, count, population.names.length),
    population: estimatesOf(rule, population, found, options.level ?? 0.95, undefined),
    groups: members.map(({ group, own, part, system, at }) => {
      system.evaluate(at);
      system.linearise(at);
      const unscaled = covarianceFromTriangle(system.triangle, system.size, 1e-7);
      return describeFit(
        rule,
        { group, unknowns: own, rows: part.rows },
        options,
        {
          ...found,
          at,
          profiles: undefined,
          covariance: memberCovariance(
            unscaled.covariance.map((entry) => entry * variance),
            weights,
            means,
          ),
          determined: unscaled.determined,
          separable: unscaled.determined,
          rivals: [],
        },
        measures,
      );
    }),
  };
}

/** Times that a group is fitted again with the weights over gaps that follow from its own fit. */
const settlings = 30;

function member(rule: Rule, group: ObservedGroup, options: FitOptions, penalty: Penalty): Member {
  const own = unknownsOf(rule, options);
  const part = prepared(rule, group, own, options);
  const [start] = startingPoints(rule, group, options, own, part);
  if (start === undefined) throw noStartError(group, rule.text);
  const workspace = squaresWorkspace(own.names.length);
  const { lower, upper } = own;
  let at = start;
  for (let round = 0; round < settlings; round++) {
    at = minimiseSquares(part.system, at, { lower, upper, workspace }).estimates;
    if (part.rows.reweigh?.(at) !== true) break;
  }
  return { group, own, part, system: penalisedSystem(part.system, penalty), workspace, at };
}

function populationUnknowns(own: Unknowns, parameters: number): Unknowns {
  const names = own.names.slice(0, parameters);
  const spreads = [...names.map((name) => `between-group sd of ${name}`), "sigma"];
  const none = new Float64Array(spreads.length);
  return {
    ...own,
    names: [...names, ...spreads],
    roles: [...own.roles.slice(0, parameters), ...spreads.map(() => "scale" as const)],
    rooted: [...names.map(() => false), ...spreads.map(() => true)],
    columns: Int32Array.from({ length: parameters + spreads.length }, (_, i) => i),
    lower: Float64Array.from([...own.lower.subarray(0, parameters), ...none]),
    upper: Float64Array.from([...own.upper.subarray(0, parameters), ...none.fill(Number.POSITIVE_INFINITY)]),
  };
}

/** Means and variances of the groups' own estimates, and their common residual variance. */
function populationStart(members: readonly Member[], parameters: number): Float64Array {
  const start = new Float64Array(2 * parameters + 1);
  for (let k = 0; k < parameters; k++) {
    const values = members.map(({ at }) => at[k]!).sort((a, b) => a - b);
    const middle = values[values.length >> 1]!;
    const spread = values.reduce((sum, value) => sum + (value - middle) ** 2, 0) / values.length;
    start[k] = middle;
    start[parameters + k] = spread || 1e-4 * middle * middle || 1e-4;
  }
  const sums = members.map(({ part, at }) => part.system.evaluate(at));
  const left = members.reduce((sum, { part }) => sum + part.rows.count - part.rows.size, 0);
  start[2 * parameters] = sums.reduce((sum, each) => sum + each, 0) / Math.max(1, left);
  return start;
}

/** Twice the negative log-likelihood of population means, variances and sigma^2, groups integrated out. */
function marginal(at: Float64Array, members: readonly Member[], { means, roots }: Penalty): number {
  const parameters = means.length;
  const variance = at[2 * parameters]!;
  let logSpreads = 0;
  for (let k = 0; k < parameters; k++) {
    const spread = at[parameters + k]!;
    means[k] = at[k]!;
    roots[k] = Math.sqrt(variance / Math.max(spread, 1e-12 * means[k]! ** 2));
    logSpreads += Math.log((2 * Math.PI * variance) / roots[k]! ** 2);
  }
  let sum = 0;
  for (const each of members) sum += memberTerm(each, variance) + logSpreads;
  return Number.isFinite(sum) ? sum : Number.POSITIVE_INFINITY;
}

function memberTerm(each: Member, variance: number): number {
  const { system, workspace, own, part } = each;
  const found = minimiseSquares(system, each.at, { lower: own.lower, upper: own.upper, workspace });
  each.at = found.estimates;
  let logDeterminant = 0;
  for (let k = 0; k < system.size; k++)
    logDeterminant += 2 * Math.log(Math.abs(system.triangle[k * system.size + k]!));
  const integrated = logDeterminant - system.size * Math.log(2 * Math.PI * variance);
  return part.rows.count * Math.log(2 * Math.PI * variance) + found.sumOfSquares / variance + integrated;
}
