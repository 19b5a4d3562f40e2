import { ruleFunction } from "../functions.js";
import { refuse, wrongArity } from "../refusals.js";
import type { Expression } from "../syntax/expression.js";
import { checkName } from "./check-name.js";
import type { Names } from "./names.js";

/** A rule works with numbers; conditions are yes or no and stand only where one is asked for. */
type Sort = "number" | "condition";

const comparisons: ReadonlySet<string> = new Set(["<", "<=", ">", ">=", "==", "!="]);

function expectSort(names: Names, at: Expression, given: Sort, wanted: Sort): void {
  if (given === wanted) return;
  if (wanted === "number") {
    const wrong = "This is a condition, yes or no, where a number is needed.";
    throw refuse(
      "condition-for-number",
      names.text,
      at,
      wrong,
      "Turn it into a number with if(condition, 1, 0).",
    );
  }
  const wrong = "This is a number where a condition, yes or no, is needed.";
  throw refuse("number-for-condition", names.text, at, wrong, "Compare it with something, as in N > 0.");
}

function checkCall(names: Names, at: Extract<Expression, { kind: "call" }>, line: number): Sort {
  const called = ruleFunction(at.name)!; // the parser lets only known functions be called
  if (at.name === "change") {
    const wrong = "A change stands inside an expression.";
    const remedy = "A change may only begin a line, as in ΔN = r*N. Use N - N[t-1] for the last change.";
    throw refuse("misplaced-change", names.text, at, wrong, remedy);
  }
  if (at.inside.length < called.fewest || at.inside.length > called.most) {
    throw wrongArity(names.text, at, called.usage, at.inside.length);
  }
  at.inside.forEach((part, index) => {
    const wanted = at.name === "if" && index === 0 ? "condition" : "number";
    expectSort(names, part, checkExpression(names, part, line), wanted);
  });
  const digits = at.inside[1];
  if (at.name === "round" && digits !== undefined && !isDigits(digits)) {
    const wrong = "The number of digits must be a whole number from 0 to 15.";
    throw refuse("unreadable-digits", names.text, digits, wrong, "Write it as in round(x, 2).");
  }
  return "number";
}

const isDigits = (at: Expression): boolean =>
  at.kind === "number" && Number.isInteger(at.value) && at.value <= 15;

/** Checks names, numbers of values and sorts in one expression of line number `line`. */
export function checkExpression(names: Names, at: Expression, line: number): Sort {
  switch (at.kind) {
    case "number":
      return "number";
    case "name":
      checkName(names, at, line);
      return "number";
    case "unary": {
      const sort = at.operator === "not" ? "condition" : "number";
      expectSort(names, at.operand, checkExpression(names, at.operand, line), sort);
      return sort;
    }
    case "binary": {
      const joins = at.operator === "and" || at.operator === "or";
      const wanted = joins ? "condition" : "number";
      expectSort(names, at.left, checkExpression(names, at.left, line), wanted);
      expectSort(names, at.right, checkExpression(names, at.right, line), wanted);
      return joins || comparisons.has(at.operator) ? "condition" : "number";
    }
    case "call":
      return checkCall(names, at, line);
  }
}

/** Checks the right side of line number `line`, which must be a number. */
export function checkRightSide(names: Names, at: Expression, line: number): void {
  expectSort(names, at, checkExpression(names, at, line), "number");
}
