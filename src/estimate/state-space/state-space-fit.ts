import { randomStream, type Warning } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { refuseNoStart } from "../refusals.js";
import { criteriaOf } from "../result/criteria.js";
import { describeFit } from "../result/describe-fit.js";
import type { GroupFit } from "../result/group-fit.js";
import { likelihoodCut } from "../search/cut.js";
import { likelihoodObjective } from "../search/likelihood-objective.js";
import { type Optimum, optimum } from "../search/optimum.js";
import { startingPoints } from "../search/starting-points.js";
import { prepared } from "../systems/prepared.js";
import { spreadNames } from "../unknowns/spread-names.js";
import { place, type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import type { Filtered } from "./filtered.js";
import { particleLikelihood } from "./particle-filter.js";
import { type Filtering, isLinearOnScale, type StateSpace, stateSpace } from "./state-space.js";

/** Shares of the one-step scatter that the two errors are begun from: process, observation. */
const splits = [
  [0.9, 0.3],
  [0.6, 0.5],
  [0.3, 0.7],
] as const;

/** Standard deviations of the long run beyond which a first value does not pass for one of them. */
const farOut = 3;

/** Fits a rule with errors in its steps and in its readings, their shares found from the record. */
export function stateSpaceFit(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  const { sd: _, ...others } = options;
  const steps: FitOptions = { ...others, errors: "process" };
  const plain = unknownsOf(rule, steps);
  const squares = prepared(rule, group, plain, steps);
  const starts = startingPoints(rule, group, steps, plain, squares);
  if (starts.length === 0) throw refuseNoStart(group, rule.text);
  const unknowns = unknownsOf(rule, options, spreadNames(rule, options));
  const begun = starts
    .slice(0, 2)
    .flatMap((start) => withSplits(start, squares.rows, unknowns, rule, options));
  const method = isLinearOnScale(rule, group, unknowns, options, begun[0]!) ? "exact" : "extended";
  const attempt = (start: Filtering["start"]): GroupFit | undefined => {
    const filtering = { start, method } as const;
    const space = stateSpace(rule, group, unknowns, options, filtering);
    const objective = likelihoodObjective(space.minusTwice, unknowns);
    const usable = begun.filter((at) => Number.isFinite(space.minusTwice(at)));
    if (usable.length === 0) return undefined;
    const found = optimum(
      objective,
      unknowns,
      usable,
      () => likelihoodCut(options),
      options.intervals !== "none",
    );
    if (start === "stationary" && !beginsInLongRun(space, found)) return undefined;
    return described(rule, group, options, unknowns, space, found, filtering);
  };
  const fitted = (method === "exact" ? attempt("stationary") : undefined) ?? attempt("diffuse");
  if (fitted === undefined) throw refuseNoStart(group, rule.text);
  return fitted;
}

function withSplits(
  start: Float64Array,
  rows: { prepare(at: Float64Array, needRows: boolean): void; residualAt(i: number): number; count: number },
  unknowns: Unknowns,
  rule: Rule,
  options: FitOptions,
): Float64Array[] {
  rows.prepare(start, false);
  let squares = 0;
  for (let i = 0; i < rows.count; i++) squares += rows.residualAt(i) ** 2;
  const scatter = squares / rows.count;
  return splits.map(([process, observation]) => {
    const whole = new Float64Array(unknowns.names.length);
    whole.set(start);
    const first = unknowns.names.length - unknowns.spreads.length;
    const known = options.sd !== undefined;
    for (let k = 0; k < unknowns.spreads.length; k++) {
      const share = known || k < rule.states.length ? process : observation;
      whole[first + k] = share * share * scatter;
    }
    return whole;
  });
}

/** Whether the first reading passes for one from the long run at the estimates. */
function beginsInLongRun(space: StateSpace, found: Optimum): boolean {
  space.rows.prepare(found.at, false);
  const first = Math.abs(space.rows.residualAt(0));
  let squares = 0;
  for (let i = 0; i < space.rows.count; i++) squares += space.rows.residualAt(i) ** 2;
  return first <= farOut * Math.max(space.longRunSd(found.at), Math.sqrt(squares / space.rows.count));
}

function described(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  space: StateSpace,
  found: Optimum,
  filtering: Filtering,
): GroupFit {
  const { rows } = space;
  const fitted = describeFit(rule, group, options, unknowns, rows, found, {
    criteria: criteriaOf(-0.5 * found.value, rows.count, unknowns.names.length),
    sigma: undefined,
    exact: false,
  });
  space.minusTwice(found.at);
  place(unknowns, found.at);
  const states = rule.states.length;
  const known = options.sd;
  const spread = (first: number): Record<string, number> =>
    Object.fromEntries(
      rule.states.map((state, s) => [state, rootOf(unknowns.spreads[first + s]) ?? known ?? Number.NaN]),
    );
  const filter: Filtered = {
    processError: spread(0),
    observationError: spread(states),
    ...filtering,
    last: { mean: Array.from(space.belief.mean), covariance: Array.from(space.belief.covariance) },
  };
  if (filtering.method === "exact" || options.intervals === "none") return { ...fitted, filter };
  const check = particleCheck(space, found.at, fitted.criteria.logLikelihood);
  if (check === undefined) return { ...fitted, filter };
  const rough = Math.abs(check.particles - check.filter) > tolerable + 2 * check.deviation;
  return {
    ...fitted,
    filter: { ...filter, check },
    warnings: rough ? [...fitted.warnings, roughFilter(check)] : fitted.warnings,
  };
}

const particles = 1000;
const repetitions = 4;
/** Log-likelihood units by which the filter may differ from particles without a word. */
const tolerable = 1;

/** The likelihood at the estimates by particles, with a fixed seed, beside the filter's. */
function particleCheck(space: StateSpace, at: Float64Array, filter: number): Filtered["check"] {
  const model = space.particleModel(at);
  let stream = randomStream(1);
  const found = Array.from({ length: repetitions }, () => {
    stream = stream.jump();
    return particleLikelihood(model, particles, stream);
  });
  // Readings almost without error single out no particle: then there is nothing to compare with.
  if (!found.every(Number.isFinite)) return undefined;
  const mean = found.reduce((sum, value) => sum + value, 0) / repetitions;
  const squares = found.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { filter, particles: mean, deviation: Math.sqrt(squares / (repetitions - 1)) };
}

function roughFilter({ filter, particles: drawn }: NonNullable<Filtered["check"]>): Warning {
  return {
    code: "filter-rough",
    message: `The filter takes the rule as straight within a step; particles, which do not, give a log-likelihood of ${drawn.toFixed(1)} instead of ${filter.toFixed(1)}: read the intervals as rough.`,
  };
}

function rootOf(variance: number | undefined): number | undefined {
  return variance === undefined ? undefined : Math.sqrt(variance);
}
