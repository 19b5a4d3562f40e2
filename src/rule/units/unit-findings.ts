import type { Warning } from "../../numeric/index.js";
import type { CheckedRule } from "../check/checked-rule.js";
import { expressionText } from "../expression-text.js";
import type { BinaryOperator, Expression } from "../syntax/expression.js";
import {
  joinUnits,
  noUnit,
  parseUnit,
  periodsIn,
  raisedUnit,
  sameUnit,
  type Unit,
  unitText,
} from "./unit.js";

/** `any` is a bare number, which fits every unit in a sum and is a pure number in a product. */
type Measured = Unit | "any" | "unknown";

interface Survey {
  readonly unitOf: (name: string) => Measured;
  readonly note: (message: string) => void;
}

const isKnown = (unit: Measured): unit is Unit => typeof unit !== "string";

/** The unit of things that must be of one unit, as in a sum; notes the first two that are not. */
function together(survey: Survey, parts: readonly Expression[], what: string): Measured {
  const units = parts.map((part) => ({ part, unit: measure(survey, part) }));
  const known = units.flatMap(({ part, unit }) => (isKnown(unit) ? [{ part, unit }] : []));
  const [first] = known;
  const odd = first && known.find(({ unit }) => !sameUnit(unit, first.unit));
  if (first !== undefined && odd !== undefined) {
    survey.note(
      `${what} joins ${expressionText(first.part)} in ${unitText(first.unit)} with ${expressionText(odd.part)} in ${unitText(odd.unit)}.`,
    );
  }
  return first?.unit ?? (units.every(({ unit }) => unit === "any") ? "any" : "unknown");
}

function pureNumber(survey: Survey, part: Expression, what: string): void {
  const unit = measure(survey, part);
  if (isKnown(unit) && !sameUnit(unit, noUnit)) {
    survey.note(
      `${what} is taken of ${expressionText(part)}, which has the unit ${unitText(unit)}; only a pure number has one.`,
    );
  }
}

function productOf(left: Measured, right: Measured, power: number): Measured {
  if (left === "unknown" || right === "unknown") return "unknown";
  if (left === "any" && right === "any") return "any";
  return joinUnits(left === "any" ? noUnit : left, right === "any" ? noUnit : right, power);
}

function powerOf(survey: Survey, base: Expression, exponent: Expression): Measured {
  const unit = measure(survey, base);
  pureNumber(survey, exponent, "A power");
  if (!isKnown(unit)) return unit;
  if (exponent.kind === "number") return raisedUnit(unit, exponent.value);
  return sameUnit(unit, noUnit) ? noUnit : "unknown";
}

const sums: ReadonlySet<BinaryOperator> = new Set(["+", "-"]);

function measureBinary(survey: Survey, at: Extract<Expression, { kind: "binary" }>): Measured {
  const { operator, left, right } = at;
  if (operator === "*") return productOf(measure(survey, left), measure(survey, right), 1);
  if (operator === "/") return productOf(measure(survey, left), measure(survey, right), -1);
  if (operator === "^") return powerOf(survey, left, right);
  if (operator === "and" || operator === "or") {
    measure(survey, left);
    measure(survey, right);
    return "any";
  }
  const what = sums.has(operator) ? `${expressionText(at)} ` : `The comparison ${expressionText(at)} `;
  const unit = together(survey, [left, right], what.trimEnd());
  return sums.has(operator) ? unit : "any";
}

function measureCall(survey: Survey, at: Extract<Expression, { kind: "call" }>): Measured {
  const { name, inside } = at;
  if (name === "min" || name === "max" || name === "mod") return together(survey, inside, expressionText(at));
  if (name === "if") {
    measure(survey, inside[0]!);
    return together(survey, inside.slice(1), expressionText(at));
  }
  if (name === "sqrt") {
    const unit = measure(survey, inside[0]!);
    return isKnown(unit) ? raisedUnit(unit, 0.5) : unit;
  }
  if (name === "abs" || name === "round" || name === "floor" || name === "ceil")
    return measure(survey, inside[0]!);
  if (name !== "sign") pureNumber(survey, inside[0]!, name);
  return noUnit;
}

function measure(survey: Survey, at: Expression): Measured {
  switch (at.kind) {
    case "number":
      return "any";
    case "name":
      return survey.unitOf(at.name);
    case "unary":
      return measure(survey, at.operand);
    case "binary":
      return measureBinary(survey, at);
    case "call":
      return measureCall(survey, at);
  }
}

function mixedPeriods(units: Readonly<Record<string, string>>): readonly string[] {
  const named = Object.entries(units).flatMap(([name, text]) =>
    periodsIn(parseUnit(text)).map((period) => ({ name, period })),
  );
  const [first] = named;
  const odd = named.find(({ period }) => period !== first?.period);
  if (first === undefined || odd === undefined) return [];
  return [
    `"${first.name}" is stated per ${first.period} and "${odd.name}" per ${odd.period}; a step is one period, so convert one of them by compounding.`,
  ];
}

/** What can be seen to be wrong with the units of a rule. A name without a unit is never at odds with another. */
export function unitFindings(rule: CheckedRule, units: Readonly<Record<string, string>>): readonly Warning[] {
  if (Object.keys(units).length === 0) return [];
  const messages = mixedPeriods(units).slice();
  const known = new Map<string, Measured>();
  for (const [name, text] of Object.entries(units)) if (text !== "") known.set(name, parseUnit(text));
  const survey: Survey = {
    unitOf: (name) => (name === "t" ? "any" : (known.get(name) ?? "unknown")),
    note: (message) => messages.push(message),
  };
  for (const { name, expression } of rule.statements) {
    const unit = measure(survey, expression);
    const own = known.get(name);
    if (own === undefined) known.set(name, unit);
    else if (isKnown(own) && isKnown(unit) && !sameUnit(own, unit)) {
      messages.push(`The line of "${name}", stated in ${unitText(own)}, comes out in ${unitText(unit)}.`);
    }
  }
  return messages.map((message) => ({
    code: "units-disagree",
    message: `${message} Correct the unit, or the rule.`,
  }));
}
