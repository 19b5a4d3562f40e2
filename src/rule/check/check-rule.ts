import { editDistance, type Warning } from "../../numeric/index.js";
import { ruleError } from "../errors.js";
import type { Statement } from "../syntax/expression.js";
import { checkRightSide } from "./check-expression.js";
import type { CheckedRule, Declarations } from "./checked-rule.js";
import { skeleton } from "./confusable-letters.js";
import { type Names, namesOf } from "./names.js";

/** Pairs of names, the second an undeclared parameter that appears later in the text. */
function pairsWithUndeclared(names: Names): readonly (readonly [string, string])[] {
  const free = names.declared === undefined ? [...names.parameters.keys()] : [];
  const set = [...names.states, ...names.quantityLines.keys(), ...names.inputs];
  return free.flatMap((name, i) => [...set, ...free.slice(0, i)].map((other) => [other, name] as const));
}

/** Names that differ by one letter are more often a typo than two names; short symbols are exempt. */
function similarNames(names: Names): readonly Warning[] {
  const isTypo = (a: string, b: string): boolean =>
    Math.min(a.length, b.length) >= 3 && editDistance(a, b) === 1;
  return pairsWithUndeclared(names).flatMap(([other, name]) => {
    const sameLook = skeleton(other) === skeleton(name);
    if (!sameLook && !isTypo(other, name)) return [];
    const how = sameLook ? "look the same but use letters of two alphabets" : "differ by one letter";
    const message = `"${other}" and "${name}" ${how} and are treated as two names. If one is a typo, correct it. To reject undeclared names, list the parameters: { parameters: [...] }.`;
    return [{ code: "names-look-alike", message }];
  });
}

function unused(names: Names): readonly Warning[] {
  const parameters = [...(names.declared ?? [])].filter((name) => !names.parameters.has(name));
  const inputs = [...names.inputs].filter((name) => !names.usedInputs.has(name));
  return [...parameters, ...inputs].map((name) => ({
    code: "declared-but-unused",
    message: `"${name}" is declared but not used in the rule. Remove it, or check the text for a typo.`,
  }));
}

/** Resolves every name of a rule, or throws with the place of the one that cannot be resolved. */
export function checkRule(
  text: string,
  statements: readonly Statement[],
  declared: Declarations,
): CheckedRule {
  const names = namesOf(text, statements, declared);
  if (names.states.size === 0) {
    const wrong = "No line sets the next value of a state.";
    const remedy = "Add a line such as N[t+1] = ... or ΔN = ...";
    throw ruleError("no-state", text, statements[0]!, wrong, remedy);
  }
  statements.forEach(({ expression }, line) => {
    checkRightSide(names, expression, line);
  });
  return {
    text,
    statements,
    states: [...names.states],
    quantities: [...names.quantityLines.keys()],
    inputs: declared.inputs.filter((name) => names.usedInputs.has(name)),
    parameters: [...names.parameters.keys()],
    lags: names.lags,
    findings: [...similarNames(names), ...unused(names)],
  };
}
