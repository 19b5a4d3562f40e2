import type { Rule } from "../rule.js";
import { ruleDefinition } from "../rule-definition.js";
import type { Statement } from "../syntax/expression.js";
import { type SetName, texExpression } from "./tex-expression.js";
import { texName } from "./tex-name.js";
import { texNumber } from "./tex-number.js";

const period = (offset: number): string => (offset === 0 ? "t" : offset > 0 ? `t+${offset}` : `t-${-offset}`);

function texTarget({ kind, name }: Statement): string {
  if (kind === "change") return `\\Delta ${texName(name, "t")}`;
  return texName(name, kind === "next" ? "t+1" : "t");
}

/**
 * A rule as TeX, one line per equation, without dollar signs.
 *
 * @param values - by parameter: the number to print in its place, as for a fitted rule; text is printed as it is, a
 *   number in full. Other parameters keep their symbols.
 * @example ruleTex(recurrence("N[t+1] = R*N")); // "N_{t+1} = R\\,N_{t}"
 */
export function ruleTex(rule: Rule, values: Readonly<Record<string, number | string>> = {}): string {
  const parameters = new Set(rule.parameters);
  const setName: SetName = (name, offset) => {
    if (name === "t") return "t";
    if (!parameters.has(name)) return texName(name, period(offset));
    return Object.hasOwn(values, name) ? texNumber(values[name]!) : texName(name, "");
  };
  return ruleDefinition(rule)
    .checked.statements.map((line) => `${texTarget(line)} = ${texExpression(line.expression, setName)}`)
    .join(" \\\\\n");
}
