import type { Rule } from "../../rule/index.js";

/** One entry of a rule's state vector: a state now, or a past value that the rule keeps. */
export interface Slot {
  readonly state: string;
  readonly lag: number;
  /** Its name at the start of a trajectory: "N[0]", which a rule without lags begins from. */
  readonly name: string;
}

/** The longest lag that the rule reads; a trajectory starts at that period, its past values being the first ones. */
export function longestLag(rule: Rule): number {
  return Math.max(0, ...rule.lags.map(({ lag }) => lag));
}

/** The rule's state vector: states in order, then the past values kept. */
export function slotsOf(rule: Rule): readonly Slot[] {
  const first = longestLag(rule);
  const all = [...rule.states.map((state) => ({ state, lag: 0 })), ...rule.lags];
  return all.map(({ state, lag }) => ({ state, lag, name: `${state}[${first - lag}]` }));
}
