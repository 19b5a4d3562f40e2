import type { ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "../options/fit-options.js";
import { scaleOf } from "../problem/scale.js";
import type { Search } from "../problem/search.js";
import { refusePartOfStart } from "../refusals.js";
import { criteriaOf } from "../result/criteria.js";
import type { FitRows } from "../rows/fit-rows.js";
import { likelihoodCut } from "../search/cut.js";
import { likelihoodObjective } from "../search/likelihood-objective.js";
import { startingPoints } from "../search/starting-points.js";
import { prepared } from "../systems/prepared.js";
import { slotsOf } from "../unknowns/slots.js";
import { spreadNames } from "../unknowns/spread-names.js";
import { type Unknowns, unknownsOf } from "../unknowns/unknowns.js";
import { type Filtering, isLinearOnScale, type StateSpace, stateSpace } from "./state-space.js";

/** Shares of the one-step scatter that the two errors are begun from: process, observation. */
const splits = [
  [0.9, 0.3],
  [0.6, 0.5],
  [0.3, 0.7],
] as const;

/** A group to be fitted with errors in its steps and in its readings, by the likelihood that a filter gives. */
export interface StateSpaceSearch extends Search {
  readonly space: StateSpace;
  readonly filtering: Filtering;
  /** Where any search may begin, whatever the filter says of it. */
  readonly begun: () => readonly Float64Array[];
}

/**
 * @param filtering - how a search before this one filtered; by default as the rule allows, from the first state as given or as read.
 * @param given - where a search before this one began.
 */
export function stateSpaceSearch(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  filtering?: Filtering,
  given?: readonly Float64Array[],
): StateSpaceSearch {
  const unknowns = unknownsOf(rule, options, spreadNames(rule, options));
  let kept = given;
  const begun = (): readonly Float64Array[] => {
    kept ??= splitStarts(rule, group, options, unknowns);
    return kept;
  };
  const how = filtering ?? filteringOf(rule, group, options, unknowns, begun());
  const space = stateSpace(rule, group, unknowns, options, how);
  const { rows, minusTwice } = space;
  return {
    kind: "state-space",
    group,
    scale: scaleOf(options),
    unknowns,
    rows,
    objective: likelihoodObjective(minusTwice, unknowns),
    starts: () => begun().filter((at) => Number.isFinite(minusTwice(at))),
    cutAt: () => likelihoodCut(options),
    measures: (_, value) => ({
      criteria: criteriaOf(-0.5 * value, rows.count, unknowns.names.length),
      sigma: undefined,
      exact: false,
    }),
    family: undefined,
    spreadAt: () => Number.NaN,
    standardised: space.standardised,
    draw: (at, _, stream) => space.draw(at, stream),
    space,
    filtering: how,
    begun,
  };
}

function filteringOf(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
  [first]: readonly Float64Array[],
): Filtering {
  const exact = first !== undefined && isLinearOnScale(rule, group, unknowns, options, first);
  return { method: exact ? "exact" : "extended", start: isKnown(rule, unknowns) ? "known" : "diffuse" };
}

/** Whether the first state is given; part of a state vector is no beginning. */
function isKnown(rule: Rule, { initial }: Unknowns): boolean {
  if (initial.every(Number.isNaN)) return false;
  const open = slotsOf(rule).filter((_, s) => Number.isNaN(initial[s]));
  if (open.length > 0) throw refusePartOfStart(rule.states, open);
  return true;
}

/** Starts of a one-step fit, its scatter split between the two errors in several ways. */
function splitStarts(
  rule: Rule,
  group: ObservedGroup,
  options: FitOptions,
  unknowns: Unknowns,
): readonly Float64Array[] {
  const { sd: _, ...others } = options;
  const steps: FitOptions = { ...others, errors: "process" };
  const plain = unknownsOf(rule, steps);
  const squares = prepared(rule, group, plain, steps);
  return startingPoints(rule, group, steps, plain, squares)
    .slice(0, 2)
    .flatMap((start) => withSplits(start, squares.rows, unknowns, rule.states.length));
}

function withSplits(start: Float64Array, rows: FitRows, unknowns: Unknowns, states: number): Float64Array[] {
  rows.prepare(start, false);
  let squares = 0;
  for (let i = 0; i < rows.count; i++) squares += rows.residualAt(i) ** 2;
  const scatter = squares / rows.count;
  return splits.map(([process, observation]) => {
    const whole = new Float64Array(unknowns.names.length);
    whole.set(start);
    const first = unknowns.names.length - unknowns.spreads.length;
    for (let k = 0; k < unknowns.spreads.length; k++)
      whole[first + k] = (k < states ? process : observation) ** 2 * scatter;
    return whole;
  });
}
