import type { Warning } from "../../numeric/index.js";
import type { CheckedRule } from "../check/checked-rule.js";
import { expressionText } from "../expression-text.js";
import type { BinaryOperator, Expression } from "../syntax/expression.js";
import {
  multiplyUnits,
  noUnit,
  parseUnit,
  sameUnit,
  timeUnitsIn,
  type Unit,
  unitPhrase,
  unitPower,
} from "./unit.js";

/** `any` is a bare number, which takes any unit in a sum and is dimensionless in a product. */
type UnitOrUnknown = Unit | "any" | "unknown";

interface UnitCheck {
  readonly unitOf: (name: string) => UnitOrUnknown;
  readonly note: (message: string) => void;
}

const isKnown = (unit: UnitOrUnknown): unit is Unit => typeof unit !== "string";

/** The unit shared by parts that must have one, as in a sum; notes the first two that differ. */
function commonUnit(check: UnitCheck, parts: readonly Expression[], what: string): UnitOrUnknown {
  const units = parts.map((part) => ({ part, unit: unitOfExpression(check, part) }));
  const known = units.flatMap(({ part, unit }) => (isKnown(unit) ? [{ part, unit }] : []));
  const [first] = known;
  const odd = first && known.find(({ unit }) => !sameUnit(unit, first.unit));
  if (first !== undefined && odd !== undefined) {
    check.note(
      `${what} combines different units: ${expressionText(first.part)} has ${unitPhrase(first.unit)}, ${expressionText(odd.part)} has ${unitPhrase(odd.unit)}.`,
    );
  }
  return first?.unit ?? (units.every(({ unit }) => unit === "any") ? "any" : "unknown");
}

function requireDimensionless(check: UnitCheck, part: Expression, what: string): void {
  const unit = unitOfExpression(check, part);
  if (isKnown(unit) && !sameUnit(unit, noUnit)) {
    check.note(`${what} must be dimensionless, but ${expressionText(part)} has ${unitPhrase(unit)}.`);
  }
}

function productOf(left: UnitOrUnknown, right: UnitOrUnknown, power: number): UnitOrUnknown {
  if (left === "unknown" || right === "unknown") return "unknown";
  if (left === "any" && right === "any") return "any";
  return multiplyUnits(left === "any" ? noUnit : left, right === "any" ? noUnit : right, power);
}

function powerOf(check: UnitCheck, base: Expression, exponent: Expression): UnitOrUnknown {
  const unit = unitOfExpression(check, base);
  requireDimensionless(check, exponent, "An exponent");
  if (!isKnown(unit)) return unit;
  if (exponent.kind === "number") return unitPower(unit, exponent.value);
  return sameUnit(unit, noUnit) ? noUnit : "unknown";
}

const sums: ReadonlySet<BinaryOperator> = new Set(["+", "-"]);

function unitOfBinary(check: UnitCheck, at: Extract<Expression, { kind: "binary" }>): UnitOrUnknown {
  const { operator, left, right } = at;
  if (operator === "*") return productOf(unitOfExpression(check, left), unitOfExpression(check, right), 1);
  if (operator === "/") return productOf(unitOfExpression(check, left), unitOfExpression(check, right), -1);
  if (operator === "^") return powerOf(check, left, right);
  if (operator === "and" || operator === "or") {
    unitOfExpression(check, left);
    unitOfExpression(check, right);
    return "any";
  }
  const what = sums.has(operator) ? `${expressionText(at)} ` : `The comparison ${expressionText(at)} `;
  const unit = commonUnit(check, [left, right], what.trimEnd());
  return sums.has(operator) ? unit : "any";
}

function unitOfCall(check: UnitCheck, at: Extract<Expression, { kind: "call" }>): UnitOrUnknown {
  const { name, args } = at;
  if (name === "min" || name === "max" || name === "mod") return commonUnit(check, args, expressionText(at));
  if (name === "if") {
    unitOfExpression(check, args[0]!);
    return commonUnit(check, args.slice(1), expressionText(at));
  }
  if (name === "sqrt") {
    const unit = unitOfExpression(check, args[0]!);
    return isKnown(unit) ? unitPower(unit, 0.5) : unit;
  }
  if (name === "abs" || name === "round" || name === "floor" || name === "ceil")
    return unitOfExpression(check, args[0]!);
  if (name !== "sign") requireDimensionless(check, args[0]!, `The argument of ${name}`);
  return noUnit;
}

function unitOfExpression(check: UnitCheck, at: Expression): UnitOrUnknown {
  switch (at.kind) {
    case "number":
      return "any";
    case "name":
      return check.unitOf(at.name);
    case "unary":
      return unitOfExpression(check, at.operand);
    case "binary":
      return unitOfBinary(check, at);
    case "call":
      return unitOfCall(check, at);
  }
}

function mixedTimeUnits(units: Readonly<Record<string, string>>): readonly string[] {
  const named = Object.entries(units).flatMap(([name, text]) =>
    timeUnitsIn(parseUnit(text)).map((period) => ({ name, period })),
  );
  const [first] = named;
  const odd = named.find(({ period }) => period !== first?.period);
  if (first === undefined || odd === undefined) return [];
  return [
    `"${first.name}" is per ${first.period} and "${odd.name}" per ${odd.period}, but a step is one period. Convert one of them by compounding.`,
  ];
}

const remedy = "Correct the units or the rule.";

/** Inconsistent units of a rule. A name without a unit agrees with every other. */
export function unitFindings(rule: CheckedRule, units: Readonly<Record<string, string>>): readonly Warning[] {
  if (Object.keys(units).length === 0) return [];
  const messages: string[] = [...mixedTimeUnits(units)];
  const known = new Map<string, UnitOrUnknown>();
  for (const [name, text] of Object.entries(units)) if (text !== "") known.set(name, parseUnit(text));
  const check: UnitCheck = {
    unitOf: (name) => (name === "t" ? "any" : (known.get(name) ?? "unknown")),
    note: (message) => messages.push(`${message} ${remedy}`),
  };
  for (const { name, expression } of rule.statements) {
    const unit = unitOfExpression(check, expression);
    const own = known.get(name);
    if (own === undefined) known.set(name, unit);
    else if (isKnown(own) && isKnown(unit) && !sameUnit(own, unit)) {
      messages.push(
        `The right-hand side of "${name}" has ${unitPhrase(unit)}, but ${name} has ${unitPhrase(own)}. ${remedy}`,
      );
    }
  }
  return messages.map((message) => ({ code: "units-disagree", message }));
}
