import { expressionText } from "./expression-text.js";
import { operations } from "./graph/operations.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";
import type { BinaryOperator, Expression } from "./syntax/expression.js";
import type { Span } from "./syntax/token.js";

/** Why a step has no finite value: the first part of the rule that fails, with its position in the text. */
export interface StepFailure extends Span {
  readonly reason: string;
}

/** Arguments of one step, in the order of the rule; the state vector includes its lags. */
export interface StepArguments {
  readonly state: Float64Array;
  readonly parameters: Float64Array;
  readonly inputs: readonly Float64Array[];
  readonly t: number;
}

/** Carries the first failing part to `explainFailure`; never leaves this file. */
class FailureFound {
  readonly failure: StepFailure;
  constructor(failure: StepFailure) {
    this.failure = failure;
  }
}

const sixDigits = (value: number): string => String(Number(value.toPrecision(6)));

function reasonOf(at: Expression, result: number, values: readonly number[]): string {
  const [a = 0, b = 0] = values;
  if (at.kind === "binary" && at.operator === "/" && b === 0) {
    return `${expressionText(at)} divides ${sixDigits(a)} by zero`;
  }
  const of = values.map(sixDigits);
  const text =
    at.kind === "call"
      ? `${at.name}(${of.join(", ")})`
      : `${expressionText(at)} with the values ${of.join(" and ")}`;
  return Number.isNaN(result) ? `${text} is undefined` : `${text} is too large to represent`;
}

const comparisons: Partial<Record<BinaryOperator, (a: number, b: number) => boolean>> = {
  "<": (a, b) => a < b,
  "<=": (a, b) => a <= b,
  ">": (a, b) => a > b,
  ">=": (a, b) => a >= b,
  "==": (a, b) => a === b,
  "!=": (a, b) => a !== b,
};

const arithmetic: Partial<Record<BinaryOperator, (a: number, b: number) => number>> = {
  "+": (a, b) => a + b,
  "-": (a, b) => a - b,
  "*": (a, b) => a * b,
  "/": (a, b) => a / b,
  "^": (a, b) => a ** b,
};

type ValueOfName = (name: string, offset: number) => number;

function requireFinite(at: Expression, result: number, values: readonly number[]): number {
  if (Number.isFinite(result)) return result;
  throw new FailureFound({ reason: reasonOf(at, result, values), start: at.start, end: at.end });
}

function nameValue(at: Extract<Expression, { kind: "name" }>, valueOfName: ValueOfName): number {
  const value = valueOfName(at.name, at.offset);
  if (Number.isFinite(value)) return value;
  throw new FailureFound({
    reason: `${expressionText(at)} is not a finite number`,
    start: at.start,
    end: at.end,
  });
}

/** Whether a condition is true; the second operand is evaluated only when it decides. */
function isTrue(at: Expression, valueOfName: ValueOfName): boolean {
  if (at.kind === "unary") return !isTrue(at.operand, valueOfName);
  if (at.kind !== "binary") return false;
  if (at.operator === "and") return isTrue(at.left, valueOfName) && isTrue(at.right, valueOfName);
  if (at.operator === "or") return isTrue(at.left, valueOfName) || isTrue(at.right, valueOfName);
  return comparisons[at.operator]!(valueAt(at.left, valueOfName), valueAt(at.right, valueOfName));
}

function callValue(at: Extract<Expression, { kind: "call" }>, valueOfName: ValueOfName): number {
  const { name, args } = at;
  if (name === "if") return valueAt(args[isTrue(args[0]!, valueOfName) ? 1 : 2]!, valueOfName);
  const values = args.map((part) => valueAt(part, valueOfName));
  const [a = 0, b = 0] = values;
  if (name === "min") return Math.min(...values);
  if (name === "max") return Math.max(...values);
  return requireFinite(at, operations[name as "exp"].value(a, b, 0), values); // all other functions are operators
}

function valueAt(at: Expression, valueOfName: ValueOfName): number {
  switch (at.kind) {
    case "number":
      return at.value;
    case "name":
      return nameValue(at, valueOfName);
    case "unary":
      return -valueAt(at.operand, valueOfName);
    case "binary": {
      const values = [valueAt(at.left, valueOfName), valueAt(at.right, valueOfName)] as const;
      return requireFinite(at, arithmetic[at.operator]!(...values), values);
    }
    case "call":
      return callValue(at, valueOfName);
  }
}

function valuesAt(rule: Rule, place: StepArguments, quantities: ReadonlyMap<string, number>): ValueOfName {
  return (name, offset) => {
    if (name === "t") return place.t;
    const input = rule.inputs.indexOf(name);
    if (input >= 0) return place.inputs[input]?.[place.t + offset] ?? Number.NaN;
    const kept = rule.lags.findIndex(({ state, lag }) => state === name && lag === -offset);
    if (offset < 0 && kept >= 0) return place.state[rule.states.length + kept]!;
    const state = rule.states.indexOf(name);
    if (state >= 0) return place.state[state]!;
    return quantities.get(name) ?? place.parameters[rule.parameters.indexOf(name)]!;
  };
}

/** Finds why a step has no finite value; undefined when it has one. */
export function explainFailure(rule: Rule, place: StepArguments): StepFailure | undefined {
  const quantities = new Map<string, number>();
  const valueOfName = valuesAt(rule, place, quantities);
  try {
    for (const { kind, name, expression } of ruleDefinition(rule).checked.statements) {
      const value = valueAt(expression, valueOfName);
      if (kind === "quantity") quantities.set(name, value);
    }
    return undefined;
  } catch (found) {
    if (found instanceof FailureFound) return found.failure;
    throw found;
  }
}
