import { argumentCountError, misplacedChangeRemedy, ruleError } from "../errors.js";
import { ruleFunction } from "../functions.js";
import type { Expression } from "../syntax/expression.js";
import { checkName } from "./check-name.js";
import type { Names } from "./names.js";

/** Rules compute with numbers; a condition may stand only where one is expected, as in `if`. */
type Kind = "number" | "condition";

const comparisons: ReadonlySet<string> = new Set(["<", "<=", ">", ">=", "==", "!="]);

function expectKind(names: Names, at: Expression, given: Kind, wanted: Kind): void {
  if (given === wanted) return;
  if (wanted === "number") {
    const wrong = "This is a condition, but a number is needed here.";
    throw ruleError(
      "condition-for-number",
      names.text,
      at,
      wrong,
      "To use a condition as a number, write if(condition, 1, 0).",
    );
  }
  const wrong = "This is a number, but a condition is needed here.";
  throw ruleError(
    "number-for-condition",
    names.text,
    at,
    wrong,
    "Compare the number with another one, as in N > 0.",
  );
}

function checkCall(names: Names, at: Extract<Expression, { kind: "call" }>, line: number): Kind {
  const called = ruleFunction(at.name)!; // the parser lets only known functions be called
  if (at.name === "change") {
    const wrong = "change(...) can only start a line.";
    const remedy = misplacedChangeRemedy;
    throw ruleError("misplaced-change", names.text, at, wrong, remedy);
  }
  if (at.args.length < called.minArgs || at.args.length > called.maxArgs) {
    throw argumentCountError(names.text, at, called, at.args.length);
  }
  at.args.forEach((part, index) => {
    const wanted = at.name === "if" && index === 0 ? "condition" : "number";
    expectKind(names, part, checkExpression(names, part, line), wanted);
  });
  const digits = at.args[1];
  if (at.name === "round" && digits !== undefined && !isDigits(digits)) {
    const wrong = "The number of decimals must be a whole number from 0 to 15.";
    throw ruleError("unreadable-digits", names.text, digits, wrong, "For two decimals, write round(x, 2).");
  }
  return "number";
}

const isDigits = (at: Expression): boolean =>
  at.kind === "number" && Number.isInteger(at.value) && at.value <= 15;

/** Checks names, argument counts and kinds in one expression of line number `line`. */
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
