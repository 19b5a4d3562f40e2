import { readNames } from "./read-names.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";
import type { Expression } from "./syntax/expression.js";

/** Every name that the rule's lines read. */
const namesRead = (rule: Rule): readonly Extract<Expression, { kind: "name" }>[] =>
  ruleDefinition(rule).checked.statements.flatMap(({ expression }) => readNames(expression));

/** By input of the rule: the earliest and latest period that a step from t reads, counted from t. */
export function inputOffsets(rule: Rule): readonly (readonly [earliest: number, latest: number])[] {
  const names = namesRead(rule);
  return rule.inputs.map((input) => {
    const offsets = names.filter(({ name }) => name === input).map(({ offset }) => offset);
    return [Math.min(...offsets), Math.max(...offsets)] as const;
  });
}

/** Whether a step depends on the period index t itself. */
export const dependsOnPeriod = (rule: Rule): boolean => namesRead(rule).some(({ name }) => name === "t");
