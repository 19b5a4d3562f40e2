import { argumentCountError, ruleError } from "../errors.js";
import { ruleFunction } from "../functions.js";
import type { Expression } from "../syntax/expression.js";
import { checkName } from "./check-name.js";
import type { Names } from "./names.js";

/** A rule works with numbers; conditions are yes or no and stand only where one is asked for. */
type Kind = "number" | "condition";

const comparisons: ReadonlySet<string> = new Set(["<", "<=", ">", ">=", "==", "!="]);

function expectKind(names: Names, at: Expression, given: Kind, wanted: Kind): void {
  if (given === wanted) return;
  if (wanted === "number") {
    const wrong = "This is a condition, yes or no, where a number is needed.";
    throw ruleError(
      "condition-for-number",
      names.text,
      at,
      wrong,
      "Turn it into a number with if(condition, 1, 0).",
    );
  }
  const wrong = "This is a number where a condition, yes or no, is needed.";
  throw ruleError("number-for-condition", names.text, at, wrong, "Compare it with something, as in N > 0.");
}

function checkCall(names: Names, at: Extract<Expression, { kind: "call" }>, line: number): Kind {
  const called = ruleFunction(at.name)!; // the parser lets only known functions be called
  if (at.name === "change") {
    const wrong = "A change stands inside an expression.";
    const remedy = "A change may only begin a line, as in ΔN = r*N. Use N - N[t-1] for the last change.";
    throw ruleError("misplaced-change", names.text, at, wrong, remedy);
  }
  if (at.args.length < called.minArgs || at.args.length > called.maxArgs) {
    throw argumentCountError(names.text, at, called.usage, at.args.length);
  }
  at.args.forEach((part, index) => {
    const wanted = at.name === "if" && index === 0 ? "condition" : "number";
    expectKind(names, part, checkExpression(names, part, line), wanted);
  });
  const digits = at.args[1];
  if (at.name === "round" && digits !== undefined && !isDigits(digits)) {
    const wrong = "The number of digits must be a whole number from 0 to 15.";
    throw ruleError("unreadable-digits", names.text, digits, wrong, "Write it as in round(x, 2).");
  }
  return "number";
}

const isDigits = (at: Expression): boolean =>
  at.kind === "number" && Number.isInteger(at.value) && at.value <= 15;

/** Checks names, numbers of values and sorts in one expression of line number `line`. */
export function checkExpression(names: Names, at: Expression, line: number): Kind {
  switch (at.kind) {
    case "number":
      return "number";
    case "name":
      checkName(names, at, line);
      return "number";
    case "unary": {
      const kind = at.operator === "not" ? "condition" : "number";
      expectKind(names, at.operand, checkExpression(names, at.operand, line), kind);
      return kind;
    }
    case "binary": {
      const joins = at.operator === "and" || at.operator === "or";
      const wanted = joins ? "condition" : "number";
      expectKind(names, at.left, checkExpression(names, at.left, line), wanted);
      expectKind(names, at.right, checkExpression(names, at.right, line), wanted);
      return joins || comparisons.has(at.operator) ? "condition" : "number";
    }
    case "call":
      return checkCall(names, at, line);
  }
}

/** Checks the right side of line number `line`, which must be a number. */
export function checkRightSide(names: Names, at: Expression, line: number): void {
  expectKind(names, at, checkExpression(names, at, line), "number");
}
