import { readNames } from "./read-names.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";
import type { Expression } from "./syntax/expression.js";
import type { Span } from "./syntax/token.js";

/** A function call at which a step is not smooth, with its position in the text. */
export interface NonsmoothCall extends Span {
  readonly function: string;
}

/** Where a step has kinks or jumps as states or parameters vary. */
export interface NonsmoothCalls {
  /** min, max, abs, if: the slope changes abruptly; derivatives there are one-sided. */
  readonly kinks: readonly NonsmoothCall[];
  /** floor, ceil, round, sign, mod: the value changes abruptly; slopes do not guide a fit. */
  readonly jumps: readonly NonsmoothCall[];
}

const withKink: ReadonlySet<string> = new Set(["min", "max", "abs", "if"]);
const withJump: ReadonlySet<string> = new Set(["floor", "ceil", "round", "sign", "mod"]);

function callsIn(at: Expression): readonly Extract<Expression, { kind: "call" }>[] {
  if (at.kind === "unary") return callsIn(at.operand);
  if (at.kind === "binary") return [...callsIn(at.left), ...callsIn(at.right)];
  return at.kind === "call" ? [at, ...at.args.flatMap(callsIn)] : [];
}

/**
 * Lists the function calls at which a step of the rule has a kink or a jump. Calls that depend on inputs and t alone
 * are left out: no fit varies them.
 *
 * @example nonsmoothCalls(recurrence("N[t+1] = max(N - c, 0)")).kinks[0].function; // "max"
 */
export function nonsmoothCalls(rule: Rule): NonsmoothCalls {
  const fixed = new Set(["t", ...rule.inputs]);
  const moves = (call: Extract<Expression, { kind: "call" }>): boolean => {
    const decisive = call.name === "if" ? call.args.slice(0, 1) : call.args;
    return decisive.flatMap(readNames).some(({ name }) => !fixed.has(name));
  };
  const calls = ruleDefinition(rule).checked.statements.flatMap(({ expression }) => callsIn(expression));
  const among = (names: ReadonlySet<string>): readonly NonsmoothCall[] =>
    calls
      .filter((call) => names.has(call.name) && moves(call))
      .map(({ name, start, end }) => ({ function: name, start, end }));
  return { kinks: among(withKink), jumps: among(withJump) };
}
