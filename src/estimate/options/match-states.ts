import type { Observations, ObservedGroup } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import { unmatchedStatesError } from "../errors.js";

/** The record with its states named as the rule names them; one state and one recorded value match as they are. */
export function matchStates(rule: Rule, observations: Observations): Observations {
  const recorded = observations.states.map((state) => state.name);
  if (rule.states.every((state) => recorded.includes(state))) return observations;
  const [state] = rule.states;
  const [only] = observations.states;
  if (rule.states.length !== 1 || observations.states.length !== 1 || !state || !only)
    throw unmatchedStatesError(rule.states, recorded);
  return {
    ...observations,
    states: [{ ...only, name: state }],
    groups: observations.groups.map((group) => renamed(group, only.name, state)),
  };
}

function renamed(group: ObservedGroup, from: string, to: string): ObservedGroup {
  const { values, censoring, replicates, ...rest } = group;
  return {
    ...rest,
    values: { [to]: values[from]! },
    ...(censoring?.[from] && { censoring: { [to]: censoring[from] } }),
    ...(replicates?.[from] && { replicates: { [to]: replicates[from] } }),
  };
}
