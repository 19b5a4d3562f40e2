import { editDistance, type Warning } from "../../numeric/index.js";
import { ruleError } from "../errors.js";
import type { Statement } from "../syntax/expression.js";
import { checkRightSide } from "./check-expression.js";
import type { CheckedRule, Declarations } from "./checked-rule.js";
import { skeleton } from "./confusable-letters.js";
import { type Names, namesOf } from "./names.js";

/** Pairs of names, the second a parameter that was not declared and came later. */
function pairsWithUndeclared(names: Names): readonly (readonly [string, string])[] {
  const free = names.declared === undefined ? [...names.parameters.keys()] : [];
  const set = [...names.states, ...names.quantityLines.keys(), ...names.inputs];
  return free.flatMap((name, i) => [...set, ...free.slice(0, i)].map((other) => [other, name] as const));
}

/** Names that differ by one letter are more often a slip than two names; short symbols are exempt. */
function similarNames(names: Names): readonly Warning[] {
  const isTypo = (a: string, b: string): boolean =>
    Math.min(a.length, b.length) >= 3 && editDistance(a, b) === 1;
  return pairsWithUndeclared(names).flatMap(([other, name]) => {
    const sameLook = skeleton(other) === skeleton(name);
    if (!sameLook && !isTypo(other, name)) return [];
    const how = sameLook
      ? "look the same and are written with letters of two alphabets"
      : "differ by one letter";
    const message = `"${other}" and "${name}" ${how}; they are read as two names. If one is a slip, correct it; declare { parameters: [...] } to have every other name refused.`;
    return [{ code: "names-look-alike", message }];
  });
}

function unused(names: Names): readonly Warning[] {
  const parameters = [...(names.declared ?? [])].filter((name) => !names.parameters.has(name));
  const inputs = [...names.inputs].filter((name) => !names.usedInputs.has(name));
  return [...parameters, ...inputs].map((name) => ({
    code: "declared-but-unused",
    message: `"${name}" is declared and stands nowhere in the rule. Take it out, or look for a slip in the text.`,
  }));
}

/** Gives every name of a rule its meaning, or refuses with the place of the one that has none. */
export function checkRule(
  text: string,
  statements: readonly Statement[],
  declared: Declarations,
): CheckedRule {
  const names = namesOf(text, statements, declared);
  if (names.states.size === 0) {
    const wrong = "No line of the rule says how a value changes from one period to the next.";
    const remedy = "Write one line as N[t+1] = ... or ΔN = ...";
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
