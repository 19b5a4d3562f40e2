import { interpretRule } from "./code/compile-rule.js";
import { makeRule } from "./make-rule.js";
import type { Rule } from "./rule.js";
import { ruleDefinition } from "./rule-definition.js";
import { texExpression } from "./tex/tex-expression.js";
import { texName } from "./tex/tex-name.js";

/** A single expression of the rule language. */
export interface Formula {
  readonly text: string;
  readonly names: readonly string[];
  readonly tex: string;
  /** Its value for given names, and for t where the formula reads it. */
  readonly at: (values: Readonly<Record<string, number>>, t?: number) => number;
}

function formulaOf(rule: Rule, text: string): Formula {
  const { step } = interpretRule(rule);
  const { expression } = ruleDefinition(rule).checked.statements[0]!;
  const next = new Float64Array(1);
  return {
    text,
    names: rule.parameters,
    tex: texExpression(expression, (name) => texName(name, "")),
    at: (values, t = 0) => {
      step(
        next,
        Float64Array.from(rule.parameters, (name) => values[name] ?? Number.NaN),
        [],
        t,
        next,
      );
      return next[0]!;
    },
  };
}

const cache = new Map<string, Formula>();

/** Reads an expression of the rule language; a condition has the value 1 or 0. */
export function formula(text: string, kind: "number" | "condition" = "number"): Formula {
  const key = `${kind}:${text}`;
  let found = cache.get(key);
  if (found === undefined) {
    // No formula uses this name.
    const body = kind === "number" ? text : `if(${text}, 1, 0)`;
    found = formulaOf(makeRule(`value_of_formula[t+1] = ${body}`, {}), text);
    cache.set(key, found);
  }
  return found;
}
