import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { criteria } from "../result/criteria.js";
import type { FitRows } from "../rows/fit-rows.js";
import { cutOf } from "../search/cut.js";
import type { Objective } from "../search/objective.js";
import { squaresObjective } from "../search/squares-objective.js";
import { startingPoints } from "../search/starting-points.js";
import { normalEquations } from "../systems/normal-equations.js";
import { prepared } from "../systems/prepared.js";
import { unknownsOf } from "../unknowns/unknowns.js";
import { recordMaker } from "./draw-record.js";
import { errorFamily } from "./error-family.js";
import { scaleOf } from "./scale.js";
import type { Search } from "./search.js";

/** A group to be fitted by least squares. */
export function leastSquaresSearch(rule: Rule, group: ObservedGroup, options: FitOptions): Search {
  const unknowns = unknownsOf(rule, options);
  const whole = prepared(rule, group, unknowns, options);
  const { rows, system } = whole;
  const family = errorFamily(options);
  const scale = scaleOf(options);
  const { from, to } = scale;
  const make = recordMaker(rule, group, rows);
  return {
    kind: "least-squares",
    group,
    scale,
    unknowns,
    rows,
    objective: squaresObjective(system, rows),
    part: (first, end) => partObjective(partOfRows(rows, first, end)),
    starts: () => startingPoints(rule, group, options, unknowns, whole),
    cutAt: (sum) => cutOf(sum, rows.count, rows.size, options),
    measures: (_, value) => ({ criteria: criteria(value, rows, options), sigma: undefined, exact: true }),
    family,
    spreadAt: (_, sigma) => sigma,
    ...(rows.reweigh && { settle: (at) => settledAt(rows, at) }),
    disturbed: (at, errors) => make(at, (fitted, i) => from(to(fitted) + errors[i]!)),
    draw: (at, sigma, stream) => make(at, (fitted, i) => family.draw(fitted, rows.roots[i]!, sigma, stream)),
  };
}

function settledAt(rows: FitRows, at: Float64Array): Float64Array {
  rows.reweigh?.(at);
  return at;
}

function partObjective(rows: FitRows): Objective {
  return squaresObjective(normalEquations(rows), rows);
}

/** Some of the compared values of a fit, one after another. */
function partOfRows(rows: FitRows, from: number, end: number): FitRows {
  return { ...rows, count: end - from, residualAt: (i) => rows.residualAt(from + i) };
}
