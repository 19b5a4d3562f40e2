import { inputByPeriod, type ObservedGroup } from "../../record/index.js";
import { inputOffsets, type Rule } from "../../rule/index.js";
import {
  refuseAllCensored,
  refuseFilteredLimit,
  refuseInputGap,
  refuseMissingInput,
  refuseNoChange,
  refuseNoCount,
  refuseNoLogarithm,
  refuseSdColumn,
  refuseSdValue,
  refuseTooFew,
} from "../refusals.js";
import { recordedPairs } from "../rows/recorded-pairs.js";
import { longestLag } from "../unknowns/slots.js";
import type { Unknowns } from "../unknowns/unknowns.js";
import { type FitOptions, onLogScale } from "./fit-options.js";

/** Refuses a group from which no honest fit can come. */
export function checkGroup(rule: Rule, group: ObservedGroup, options: FitOptions, unknowns: Unknowns): void {
  checkNumber(rule, group, options, unknowns.names);
  checkRecorded(rule, group, options);
}

/** Refuses values, inputs and limits of which no fit can make anything, whether the group is fitted by itself or not. */
export function checkRecorded(rule: Rule, group: ObservedGroup, options: FitOptions): void {
  checkInputs(rule, group, options);
  checkSd(group, options);
  for (const state of rule.states) {
    checkState(group, state, options);
    checkCensoring(group, state, options);
  }
}

function checkNumber(rule: Rule, group: ObservedGroup, options: FitOptions, names: readonly string[]): void {
  const pairs = options.errors === "process";
  const usable = pairs ? recordedPairs(rule, group).to.length : group.index.length;
  if (usable < names.length + 3) throw refuseTooFew(group, usable, names, pairs ? "pairs" : "values");
}

/** Every input must be recorded in every period that a fitted step reads. */
function checkInputs(rule: Rule, group: ObservedGroup, options: FitOptions): void {
  const reach = rule.inputs.length === 0 ? [] : inputOffsets(rule);
  rule.inputs.forEach((name, k) => {
    if (!group.inputs[name]) throw refuseMissingInput(name, group);
    const [earliest, latest] = reach[k]!;
    const column = inputByPeriod(group, name);
    for (const period of steppedPeriods(rule, group, options))
      for (let at = period + earliest; at <= period + latest; at++)
        if (!Number.isFinite(column[at])) throw refuseInputGap(name, group, at);
  });
}

/** A column of standard deviations holds a positive one in every row. */
function checkSd(group: ObservedGroup, { sd }: FitOptions): void {
  if (typeof sd !== "string") return;
  const column = group.inputs[sd];
  if (column === undefined) throw refuseSdColumn(sd, Object.keys(group.inputs));
  const bad = column.findIndex((each) => !(each > 0 && Number.isFinite(each)));
  if (bad >= 0) throw refuseSdValue(sd, group, group.rows[bad]!, column[bad]!);
}

/** The periods from which the fit takes a step. */
function steppedPeriods(rule: Rule, group: ObservedGroup, options: FitOptions): readonly number[] {
  const between = (first: number, end: number): number[] =>
    Array.from({ length: Math.max(0, end - first) }, (_, k) => first + k);
  if (options.errors !== "process") return between(longestLag(rule), group.index[group.index.length - 1]!);
  const { from, to } = recordedPairs(rule, group);
  return Array.from(from).flatMap((entry, pair) => between(group.index[entry]!, group.index[to[pair]!]!));
}

function checkState(group: ObservedGroup, state: string, options: FitOptions): void {
  const values = group.values[state]!;
  const censoring = group.censoring?.[state];
  if (values.every((value) => value === values[0]) && !censoring?.some((mark) => mark !== 0))
    throw refuseNoChange(group, values[0]!);
  const counts = options.distribution === "poisson" || options.distribution === "negative-binomial";
  const wrong = (value: number): boolean =>
    onLogScale(options) ? value <= 0 : counts && !(value >= 0 && Number.isInteger(value));
  const bad = values.findIndex(wrong);
  if (bad < 0) return;
  const refuse = counts ? refuseNoCount : refuseNoLogarithm;
  throw refuse(group, group.rows[bad]!, values[bad]!);
}

function checkCensoring(group: ObservedGroup, state: string, { errors }: FitOptions): void {
  const censoring = group.censoring?.[state];
  if (!censoring) return;
  const marked = censoring.findIndex((mark) => mark !== 0);
  if (errors === "both" && marked >= 0) throw refuseFilteredLimit(group, state, group.rows[marked]!);
  const sides = new Set(censoring);
  if (sides.has(0) || sides.size > 1) return;
  throw refuseAllCensored(group, state, sides.has(1) ? "above" : "below");
}
