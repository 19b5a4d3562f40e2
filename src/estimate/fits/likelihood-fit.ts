import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { type FitOptions, onLogScale } from "../options/fit-options.js";
import { refuseNoStart } from "../refusals.js";
import { criteriaOf } from "../result/criteria.js";
import { describeFit } from "../result/describe-fit.js";
import type { GroupFit } from "../result/group-fit.js";
import type { FitRows } from "../rows/fit-rows.js";
import { likelihoodCut, normalLikelihoodCut } from "../search/cut.js";
import { likelihoodObjective } from "../search/likelihood-objective.js";
import { optimum } from "../search/optimum.js";
import { startingPoints } from "../search/starting-points.js";
import { prepared } from "../systems/prepared.js";
import { place, type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import {
  negativeBinomialLikelihood,
  normalLikelihood,
  poissonLikelihood,
  type ValueLikelihood,
} from "./value-likelihood.js";

/** Fits a rule to counts, or to a record with censored values, by maximum likelihood. */
export function likelihoodFit(rule: Rule, group: ObservedGroup, options: FitOptions): GroupFit {
  const likelihood = likelihoodOf(options);
  const plain = unknownsOf(rule, options);
  const squares = prepared(rule, group, plain, options);
  const starts = startingPoints(rule, group, options, plain, squares);
  if (starts.length === 0) throw refuseNoStart(group, rule.text);
  const unknowns = unknownsOf(rule, options, likelihood.spreads);
  const { rows } = prepared(rule, group, unknowns, options);
  const minusTwice = minusTwiceLogLikelihood(rule, group, rows, unknowns, likelihood);
  const normal = likelihood.spreads[0] === "sigma";
  const found = optimum(
    likelihoodObjective(minusTwice, unknowns),
    unknowns,
    starts.map((start) => withSpread(start, rows, unknowns, options)),
    () => (normal ? normalLikelihoodCut(rows.count, plain.names.length, options) : likelihoodCut(options)),
    options.intervals !== "none",
  );
  const spread = unknowns.roles.indexOf("scale");
  return describeFit(rule, group, options, unknowns, rows, found, {
    criteria: criteriaOf(-0.5 * found.value, rows.count, unknowns.names.length),
    sigma: normal ? Math.sqrt(found.at[spread]!) : undefined,
    exact: false,
  });
}

function likelihoodOf({ distribution: spread = "normal", sd }: FitOptions): ValueLikelihood {
  if (spread === "poisson") return poissonLikelihood;
  if (spread === "negative-binomial") return negativeBinomialLikelihood;
  return normalLikelihood(spread === "lognormal", sd !== undefined);
}

function minusTwiceLogLikelihood(
  rule: Rule,
  group: ObservedGroup,
  rows: FitRows,
  unknowns: Unknowns,
  likelihood: ValueLikelihood,
): (at: Float64Array) => number {
  const censoring = Int8Array.from(
    rows.entries,
    (entry, i) => group.censoring?.[rule.states[rows.states[i]!]!]?.[entry] ?? 0,
  );
  return (at) => {
    place(unknowns, at);
    rows.prepare(at, false);
    const spread = spreadOf(unknowns);
    let sum = 0;
    for (let i = 0; i < rows.count; i++) {
      rows.residualAt(i);
      sum += likelihood.of(rows.observed[i]!, rows.fitted(), censoring[i]!, rows.roots[i]!, spread);
    }
    return Number.isFinite(sum) ? -2 * sum : Number.POSITIVE_INFINITY;
  };
}

function spreadOf({ spreads, rooted }: Unknowns): number {
  const [spread] = spreads;
  if (spread === undefined) return 1;
  // A dispersion of 0 is the Poisson distribution, which the formulas reach only in the limit.
  return rooted.includes(true) ? Math.sqrt(spread) : Math.max(spread, 1e-9);
}

/** A start with its spread put where the residuals say: their root mean square, or the excess over a Poisson's. */
function withSpread(
  start: Float64Array,
  rows: FitRows,
  unknowns: Unknowns,
  options: FitOptions,
): Float64Array {
  const whole = new Float64Array(unknowns.names.length);
  whole.set(start);
  rows.prepare(whole, false);
  let squares = 0;
  let excess = 0;
  let means = 0;
  for (let i = 0; i < rows.count; i++) {
    squares += rows.residualAt(i) ** 2;
    excess += (rows.observed[i]! - rows.fitted()) ** 2 - rows.fitted();
    means += rows.fitted() ** 2;
  }
  const counts = options.distribution === "negative-binomial" && !onLogScale(options);
  const spread = counts ? Math.max(excess / means, 0.01) : squares / rows.count;
  unknowns.roles.forEach((role, i) => {
    if (role === "scale") whole[i] = spread;
  });
  return whole;
}
