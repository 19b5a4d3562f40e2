import { type Rule, ruleLines } from "../../src/rule/index.js";

/** Longest label that stands in a title. */
const longest = 60;

/** " of N[t+1] = R*N": a rule behind a title, where it is short enough to be read there. */
export function ruleTitle(label: string, joint: string): string {
  return label.length <= longest ? ` ${joint} ${label}` : "";
}

/** The lines of rules that a title or table calls by a name. */
export function ruleNotes(rules: readonly Rule[]): readonly string[] {
  const named = rules.filter(({ name }) => name !== undefined);
  return [...new Set(named.map((rule) => `Rule "${rule.name}": ${ruleLines(rule)}.`))];
}

/** A rule by its label and its lines, for the steps of a rerun. */
export function ruleInFull(rule: Rule): string {
  return rule.name === undefined ? `"${ruleLines(rule)}"` : `"${rule.name}" (${ruleLines(rule)})`;
}
