import { graphEvaluator } from "./code/graph-evaluator.js";
import type { StepArguments } from "./explain-failure.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";

/** A function that evaluates the quantities of the rule, in order, for the arguments of a step. */
export function quantitiesAt(rule: Rule): (place: StepArguments) => readonly number[] {
  const { quantities } = ruleDefinition(rule).graph;
  const evaluate = graphEvaluator(quantities);
  return (place) => {
    const read = evaluate(place);
    return quantities.map(read);
  };
}
