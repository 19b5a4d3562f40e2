import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";
import type { Expression } from "./syntax/expression.js";

/** The names that an expression reads, with the period of each. */
export function readNames(at: Expression): readonly Extract<Expression, { kind: "name" }>[] {
  switch (at.kind) {
    case "number":
      return [];
    case "name":
      return [at];
    case "unary":
      return readNames(at.operand);
    case "binary":
      return [...readNames(at.left), ...readNames(at.right)];
    case "call":
      return at.inside.flatMap(readNames);
  }
}

/** Every name that the rule's lines read. */
export const namesRead = (rule: Rule): readonly Extract<Expression, { kind: "name" }>[] =>
  ruleDefinition(rule).checked.statements.flatMap(({ expression }) => readNames(expression));

/** By input of the rule: the earliest and latest period that a step from t reads, counted from t. */
export function inputReach(rule: Rule): readonly (readonly [earliest: number, latest: number])[] {
  const names = namesRead(rule);
  return rule.inputs.map((input) => {
    const offsets = names.filter(({ name }) => name === input).map(({ offset }) => offset);
    return [Math.min(...offsets), Math.max(...offsets)] as const;
  });
}

/** Whether a step depends on the period index t itself. */
export const readsPeriod = (rule: Rule): boolean => namesRead(rule).some(({ name }) => name === "t");
