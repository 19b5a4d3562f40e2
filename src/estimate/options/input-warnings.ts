import type { Warning } from "../../numeric/index.js";
import type { Observations } from "../../record/index.js";
import type { Rule } from "../../rule/index.js";
import type { FitOptions } from "./fit-options.js";

/** Recorded inputs that the rule takes for parameters, or does not read at all: the commonest slip with inputs. */
export function inputWarnings(
  rule: Rule,
  { inputs }: Observations,
  { fixed = {}, sd }: FitOptions,
): Warning[] {
  const unread = inputs.filter(
    (input) => !rule.inputs.includes(input) && !Object.hasOwn(fixed, input) && input !== sd,
  );
  return unread.map((input) =>
    rule.parameters.includes(input)
      ? { code: "input-taken-as-parameter", message: takenAsParameter(rule, input) }
      : { code: "input-not-used", message: notUsed(rule, input) },
  );
}

/** How the same rule is written so that it reads an input. */
const readingIt = (rule: Rule, input: string): string =>
  `${rule.named === undefined ? "recurrence(..., " : `rules.${rule.named.name}(`}{ inputs: ["${input}"] })`;

function takenAsParameter(rule: Rule, input: string): string {
  return `The record holds an input "${input}", but the rule takes ${input} as a parameter: write ${readingIt(rule, input)}.`;
}

function notUsed(rule: Rule, input: string): string {
  const said = `The record holds an input "${input}", which the rule does not read, so it was not used`;
  const symbol = rule.named?.optionalInputs?.find((name) => rule.parameters.includes(name));
  if (symbol === undefined) return `${said}.`;
  return `${said}; ${symbol} of the rule was taken as a parameter. If ${input} is ${symbol}, give observations(..., { inputs: { ${symbol}: "${input}" } }) and ${readingIt(rule, symbol)}.`;
}
