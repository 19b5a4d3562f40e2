import { randomStream, type Warning } from "../../numeric/index.js";
import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { knownSd } from "../problem/noise.js";
import { refuseNoStart } from "../refusals.js";
import { describeFit } from "../result/describe-fit.js";
import type { GroupFit } from "../result/group-fit.js";
import { type Optimum, optimum } from "../search/optimum.js";
import { place } from "../unknowns/unknowns.js";
import type { Filtered, ParticleCheck } from "./filtered.js";
import { particleLikelihood } from "./particle-filter.js";
import type { StateSpace } from "./state-space.js";
import { type StateSpaceSearch, stateSpaceSearch } from "./state-space-search.js";

/** Standard deviations of the long run beyond which a first value does not pass for one of them. */
const farOut = 3;

/**
 * Fits a rule with errors in its steps and in its readings, their shares found from the record. Whether the first
 * reading passes for one of the long run is judged by a fit that does not take it for one: a fit that does widens the
 * long run until the reading lies in it.
 */
export function stateSpaceFit(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  const search = stateSpaceSearch(rule, group, options);
  const settled = search.filtering.method === "exact" && search.filtering.start === "diffuse";
  const fitted = (settled ? fromLongRun(rule, search, options) : undefined) ?? solved(rule, search, options);
  if (fitted === undefined) throw refuseNoStart(group, rule.text);
  return fitted;
}

function fromLongRun(rule: Rule, asRead: StateSpaceSearch, options: FitOptions): GroupFit | undefined {
  const { objective, unknowns, cutAt, space, group, begun } = asRead;
  const starts = asRead.starts();
  if (starts.length === 0) return undefined;
  const { at } = optimum(objective, unknowns, starts, cutAt, false);
  if (!(Math.abs(space.firstInLongRun(at)) <= farOut)) return undefined;
  const filtering = { start: "stationary", method: "exact" } as const;
  return solved(rule, stateSpaceSearch(rule, group, options, filtering, [at, ...begun()]), options);
}

function solved(rule: Rule, search: StateSpaceSearch, options: FitOptions): GroupFit | undefined {
  const starts = search.starts();
  if (starts.length === 0) return undefined;
  const { objective, unknowns, cutAt } = search;
  const found = optimum(objective, unknowns, starts, cutAt, options.intervals !== "none");
  return described(rule, search, options, found);
}

function described(rule: Rule, search: StateSpaceSearch, options: FitOptions, found: Optimum): GroupFit {
  const { space, unknowns, filtering } = search;
  const measures = search.measures(found.at, found.value);
  const fitted = describeFit(rule, search, options, found, measures);
  space.minusTwice(found.at);
  place(unknowns, found.at);
  const states = rule.states.length;
  const known = knownSd(search.group, options);
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
  const check = particleCheck(space, found.at, measures.criteria.logLikelihood);
  return {
    ...fitted,
    filter: { ...filter, check },
    warnings: [...fitted.warnings, ...roughFilter(check)],
  };
}

const particles = 1000;
const repetitions = 4;
/** Log-likelihood units by which the filter may differ from particles without a word. */
const tolerable = 1;

/** The likelihood at the estimates by particles, with a fixed seed, beside the filter's. */
function particleCheck(space: StateSpace, at: Float64Array, filter: number): ParticleCheck {
  const model = space.particleModel(at);
  let stream = randomStream(1);
  const runs = Array.from({ length: repetitions }, () => {
    stream = stream.jump();
    return particleLikelihood(model, particles, stream);
  });
  // Readings almost without error single out no particle.
  const found = runs.filter(Number.isFinite);
  const lost = { filter, lost: repetitions - found.length, of: repetitions };
  if (found.length < 2) return { ...lost, particles: undefined, deviation: undefined };
  const mean = found.reduce((sum, value) => sum + value, 0) / found.length;
  const squares = found.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { ...lost, particles: mean, deviation: Math.sqrt(squares / (found.length - 1)) };
}

/** Said where the filter's likelihood is not that of the particles; a check that came to nothing stands in the conventions. */
function roughFilter({ filter, particles: drawn, deviation }: ParticleCheck): Warning[] {
  if (drawn === undefined || Math.abs(drawn - filter) <= tolerable + 2 * deviation!) return [];
  return [
    {
      code: "filter-rough",
      message: `The filter takes the rule as straight within a step; particles, which do not, give a log-likelihood of ${drawn.toFixed(1)} instead of ${filter.toFixed(1)}: read the intervals as rough.`,
    },
  ];
}

function rootOf(variance: number | undefined): number | undefined {
  return variance === undefined ? undefined : Math.sqrt(variance);
}
